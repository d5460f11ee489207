import { utils, type WorkBook, type WorkSheet, write } from '@e965/xlsx';
import { describe, expect, it } from 'vitest';
import { workbookOf } from './workbook';
import { xmlTree } from './xmlTree';
import { zipDirectory } from './zip';

function bytesOf(
  sheets: Record<string, WorkSheet>,
  bookType: 'xlsx' | 'biff8' = 'xlsx',
  more: Partial<WorkBook> = {},
): Uint8Array {
  const book = utils.book_new();
  for (const [name, sheet] of Object.entries(sheets)) utils.book_append_sheet(book, sheet, name);
  const made: unknown = write({ ...book, ...more }, { type: 'buffer', bookType });
  if (!Buffer.isBuffer(made)) throw new Error('not written');
  return new Uint8Array(made);
}

async function grid(bytes: Uint8Array): Promise<readonly (readonly string[])[]> {
  const book = await workbookOf(bytes);
  if (!book.ok) throw new Error(book.reason);
  return book.sheets[0]?.grid ?? [];
}

describe('a workbook as a person sees it', () => {
  it.each(['xlsx', 'biff8'] as const)(
    '%s: numbers as their format shows them, days as ISO, words as they are',
    async (type) => {
      const sheet = utils.aoa_to_sheet([
        ['pH', 'P', 'Day', 'Share'],
        [6.4, 1042, 45580, 0.042],
        ['<0.1', 'nd', 45581.75, 'x'],
      ]);
      for (const [at, format] of [
        ['A2', '0.00'],
        ['B2', '#,##0'],
        ['C2', 'm/d/yy'],
        ['C3', 'yyyy-mm-dd hh:mm'],
        ['D2', '0.0%'],
      ] as const) {
        const cell = sheet[at];
        if (cell !== undefined) cell.z = format;
      }
      // Day 45580 of the 1900 calendar is 15 October 2024 (ECMA-376, 18.17.4.1).
      expect(await grid(bytesOf({ One: sheet }, type))).toEqual([
        ['pH', 'P', 'Day', 'Share'],
        ['6.40', '1,042', '2024-10-15', '4.2%'],
        ['<0.1', 'nd', '2024-10-16', 'x'],
      ]);
    },
  );

  it('counts days from 1904 where the workbook says so', async () => {
    const sheet = utils.aoa_to_sheet([[44118]]);
    if (sheet.A1 !== undefined) sheet.A1.z = 'yyyy-mm-dd';
    expect(await grid(bytesOf({ One: sheet }, 'xlsx', { Workbook: { WBProps: { date1904: true } } }))).toEqual([
      ['2024-10-15'],
    ]);
  });

  it('leaves out what is hidden, keeps the places of the rest, and says so', async () => {
    const sheet = utils.aoa_to_sheet([
      ['a', 'b', 'c'],
      ['1', '2', '3'],
      ['4', '5', '6'],
    ]);
    sheet['!rows'] = [{}, { hidden: true }];
    sheet['!cols'] = [{}, { hidden: true }];
    const bytes = bytesOf({ One: sheet, Two: utils.aoa_to_sheet([['secret']]) }, 'xlsx', {
      Workbook: { Sheets: [{ Hidden: 0 }, { Hidden: 1 }] },
    });
    const book = await workbookOf(bytes);
    expect(book).toMatchObject({ ok: true, sheets: [{ number: 1, grid: [['a', '', 'c'], [], ['4', '', '6']] }] });
    expect(book.ok ? book.remarks.map((remark) => remark.code) : []).toEqual(['hidden-not-read']);
    expect(book.ok ? book.remarks[0]?.sentence : '').toContain('1 hidden sheet and 1 hidden row and 1 hidden column');
  });

  it('gives words merged over rows to each of them, and merged numbers once', async () => {
    const sheet = utils.aoa_to_sheet([
      ['North', 6.4],
      ['', 6.5],
      ['', 7],
    ]);
    sheet['!merges'] = [
      { s: { r: 0, c: 0 }, e: { r: 1, c: 0 } },
      { s: { r: 1, c: 1 }, e: { r: 2, c: 1 } },
    ];
    expect((await grid(bytesOf({ One: sheet }))).map((row) => row[0] ?? '')).toEqual(['North', 'North', '']);
  });

  it('never works out a formula: the number kept with it counts, without one the cell is empty and said', async () => {
    const sheet = utils.aoa_to_sheet([['x', 'y']]);
    sheet.A2 = { t: 'n', v: 12, f: '6*2' };
    sheet['!ref'] = 'A1:B2';
    expect((await grid(bytesOf({ One: sheet })))[1]?.[0]).toBe('12');
  });

  it('takes 20,000 rows and 1,000 columns, and no more', async () => {
    const tall = (rows: number) => bytesOf({ One: utils.aoa_to_sheet(Array.from({ length: rows }, () => ['1'])) });
    const wide = (columns: number) =>
      bytesOf({ One: utils.aoa_to_sheet([Array.from({ length: columns }, () => '1')]) });
    expect((await workbookOf(tall(20_000))).ok).toBe(true);
    expect(await workbookOf(tall(20_001))).toEqual({ ok: false, reason: 'table-too-large' });
    expect((await workbookOf(wide(1_000))).ok).toBe(true);
    expect(await workbookOf(wide(1_001))).toEqual({ ok: false, reason: 'table-too-large' });
  });

  it('refuses what only begins like a workbook', async () => {
    const whole = bytesOf({ One: utils.aoa_to_sheet([['a']]) });
    expect(await workbookOf(whole.subarray(0, whole.length - 40))).toEqual({ ok: false, reason: 'sheet-truncated' });
    expect(zipDirectory(Uint8Array.from([0x50, 0x4b, 3, 4]))).toBeNull();
  });
});

describe('XML as a tree', () => {
  it('keeps names without their prefix, text and where it begins', () => {
    const tree = xmlTree(
      '<?xml version="1.0"?>\n<m:a xmlns:m="urn:x" m:id="7">\n  <b> 6.4 </b><c><![CDATA[<0.1]]></c>\n</m:a>',
    );
    if (!tree.ok) throw new Error(tree.reason);
    expect(tree.root).toMatchObject({ name: 'a', attributes: { id: '7' } });
    const [b, c] = tree.root.children;
    expect(b).toMatchObject({ name: 'b', text: ' 6.4 ', line: 3, column: 6 });
    expect(c?.text).toBe('<0.1');
  });
  it.each([
    ['<!DOCTYPE a><a/>', 'xml-declares-entities'],
    ['<a/><!doctype a>', 'xml-declares-entities'],
    ['<a><!ENTITY x "y"></a>', 'xml-declares-entities'],
    ['<a>&x;</a>', 'broken-xml'],
    ['<a><b></a>', 'broken-xml'],
    ['', 'broken-xml'],
    [`${'<a>'.repeat(61)}${'</a>'.repeat(61)}`, 'nested-too-deep'],
    [`<a>${'<b/>'.repeat(400_001)}</a>`, 'table-too-large'],
  ])('%.40s is refused', (text, reason) => {
    expect(xmlTree(text)).toEqual({ ok: false, reason });
  });
});
