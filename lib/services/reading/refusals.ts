/** Why a file was not read. Each has its own sentence: what happened, what was kept, what to do next. */
const SENTENCES = {
  empty: 'This file is empty. Save it again where it came from and upload it once more.',
  'not-what-it-says':
    'The content of this file does not match its name. Save it again under its real type and upload it once more.',
  'type-not-accepted':
    'Loamline reads PDF files, pictures, data files (CSV, XLSX, XLS), plain text and the open laboratory formats (XML, JSON). Save the report as one of these, or type the numbers in.',
  'too-large':
    'This file is larger than Loamline reads: 20 MB for a PDF or picture, 5 MB for a data file. It was not opened; cut it into smaller files, or type the numbers in.',
  'kept-not-read': 'Files of this kind cannot be read yet. The file is kept; type the numbers in beside the page.',
  encrypted:
    'This PDF is locked with a password. It is kept; save a copy without the password and upload that, or type the numbers in.',
  truncated:
    'This PDF ends before it should; the download was probably cut off. It is kept; fetch it once more and upload it again, or type the numbers in.',
  broken: 'This PDF is damaged and could not be opened. It is kept; fetch it once more, or type the numbers in.',
  'not-a-pdf': 'This file is named as a PDF but is something else. Open it, save it as a PDF and upload that.',
  'pdf-unpacks-too-large':
    'This PDF unpacks to far more than any report holds and was not opened. It is kept; print it to a new PDF and upload that, or type the numbers in.',
  'too-many-pages':
    'This PDF has more than 60 pages. It is kept; save the pages with your results as a file of their own.',
  'encrypted-sheet':
    'This workbook is locked with a password. It is kept; save a copy without the password and upload that, or type the numbers in.',
  'sheet-truncated':
    'This workbook ends before it should; the download was probably cut off. It is kept; fetch it once more and upload it again, or type the numbers in.',
  'broken-sheet':
    'This workbook is damaged and could not be opened. It is kept; open and save it in your own program, or save it as CSV and upload that.',
  'unpacks-too-large':
    'This workbook unpacks to far more than a laboratory’s data and was not opened. It is kept; save the sheet with your results as CSV and upload that.',
  'table-too-large':
    'This file has more than 20,000 rows, 1,000 columns, 60 sheets or 400,000 parts. It is kept; cut it into smaller files and upload those.',
  'xml-declares-entities':
    'This XML file declares a document type or entities of its own, which laboratory data never needs, so it was not read. It is kept; ask the laboratory for a plain file, or type the numbers in.',
  'nested-too-deep':
    'This file nests its parts deeper than laboratory data ever does and was not read. It is kept; ask the laboratory for a plain file, or type the numbers in.',
  'broken-xml':
    'This XML file breaks off or is not well formed, so it was not read. It is kept; fetch it once more, or type the numbers in.',
  'broken-json':
    'This JSON file breaks off or is not well formed, so it was not read. It is kept; fetch it once more, or type the numbers in.',
  'not-a-sheet':
    'A spreadsheet of your own is taken as XLSX, XLS or CSV, and this file is none of them. It is kept; save the sheet as CSV and send that.',
  'own-sheet-too-large':
    'This spreadsheet has more than 5,000 rows or 200 columns. It is kept; save the part with your results as a file of its own and send that.',
  'picture-broken':
    'This picture is damaged and could not be opened. It is kept; take or save it once more, or type the numbers in.',
  'picture-truncated':
    'This picture ends before it should; the transfer was probably cut off. It is kept; send or save it once more and upload that, or type the numbers in.',
  'picture-too-large':
    'This picture has more than 40 megapixels and was not opened. It is kept; save it smaller and upload that, or type the numbers in beside it.',
  'picture-unreadable':
    'No print could be made out in this picture. It is kept; take it again flat, sharp and in good light, or type the numbers in beside it.',
  'too-many-scans':
    'This PDF has more than 12 scanned pages. It is kept; save the pages with your results as a file of their own.',
  'too-slow':
    'Reading this file took too long and was stopped. It is kept; cut it into smaller files and upload those, or type the numbers in beside the page.',
  'too-much-memory':
    'Reading this file needed too much memory and was stopped. It is kept; cut it into smaller files and upload those, or type the numbers in beside the page.',
  crashed: 'Reading this file failed. It is kept; type the numbers in beside the page.',
} as const;

export type RefusalCode = keyof typeof SENTENCES;

export function refusal(code: RefusalCode): { code: RefusalCode; sentence: string } {
  return { code, sentence: SENTENCES[code] };
}
