/** Why a file was not read. Each has its own sentence: what happened, what was kept, what to do next. */
const SENTENCES = {
  empty: 'This file is empty. Save it again where it came from and upload it once more.',
  'not-what-it-says':
    'The content of this file does not match its name. Save it again under its real type and upload it once more.',
  'type-not-accepted': 'Loamline reads PDF and CSV files. Save the report as one of these, or type the numbers in.',
  'too-large': 'This file is larger than Loamline reads. Save it smaller, or type the numbers in.',
  'kept-not-read':
    'Pictures and spreadsheets of this kind cannot be read yet. The file is kept; type the numbers in beside the page.',
  encrypted:
    'This PDF is locked with a password. It is kept; save a copy without the password and upload that, or type the numbers in.',
  truncated:
    'This PDF ends before it should; the download was probably cut off. Fetch it once more and upload it again.',
  broken: 'This PDF is damaged and could not be opened. It is kept; fetch it once more, or type the numbers in.',
  'not-a-pdf': 'This file is named as a PDF but is something else. Open it, save it as a PDF and upload that.',
  'too-many-pages':
    'This PDF has more than 60 pages. It is kept; save the pages with your results as a file of their own.',
  'too-slow': 'Reading this file took too long and was stopped. It is kept; type the numbers in beside the page.',
  'too-much-memory':
    'Reading this file needed too much memory and was stopped. It is kept; type the numbers in beside the page.',
  crashed: 'Reading this file failed. It is kept; type the numbers in beside the page.',
} as const;

export type RefusalCode = keyof typeof SENTENCES;

export function refusal(code: RefusalCode): { code: RefusalCode; sentence: string } {
  return { code, sentence: SENTENCES[code] };
}
