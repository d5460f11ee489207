import type { DataNode } from './node';

/** Laboratory data nests about ten deep. */
const DEEPEST = 60;
const MOST_PARTS = 400_000;

export type JsonTree =
  | { readonly ok: true; readonly root: DataNode }
  | { readonly ok: false; readonly reason: 'broken-json' | 'nested-too-deep' | 'table-too-large' };

class Stop extends Error {
  constructor(readonly why: 'broken-json' | 'nested-too-deep' | 'table-too-large') {
    super(why);
  }
}

type Reader = { readonly text: string; at: number; line: number; start: number; parts: number };

function skip(reader: Reader) {
  for (;;) {
    const letter = reader.text[reader.at];
    if (letter === '\n') {
      reader.line += 1;
      reader.start = reader.at + 1;
    } else if (letter !== ' ' && letter !== '\t' && letter !== '\r') return;
    reader.at += 1;
  }
}

function expect(reader: Reader, letter: string) {
  if (reader.text[reader.at] !== letter) throw new Stop('broken-json');
  reader.at += 1;
}

const STRING = /"(?:[^"\\]|\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4}))*"/y;
const SCALAR = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?|true|false|null/y;

function token(reader: Reader, pattern: RegExp): string {
  pattern.lastIndex = reader.at;
  const found = pattern.exec(reader.text)?.[0];
  if (found === undefined) throw new Stop('broken-json');
  reader.at += found.length;
  return found;
}

function stringAt(reader: Reader): string {
  const written = token(reader, STRING);
  try {
    const value: unknown = JSON.parse(written);
    return typeof value === 'string' ? value : '';
  } catch {
    throw new Stop('broken-json');
  }
}

/** A value under a name: an array becomes as many parts of that name as it has members. */
function valuesAt(reader: Reader, name: string, depth: number): DataNode[] {
  if (depth > DEEPEST) throw new Stop('nested-too-deep');
  reader.parts += 1;
  if (reader.parts > MOST_PARTS) throw new Stop('table-too-large');
  skip(reader);
  const place = { line: reader.line, column: reader.at - reader.start + 1 };
  const letter = reader.text[reader.at];
  if (letter === '{') return [{ name, attributes: {}, text: '', ...place, children: membersAt(reader, depth) }];
  if (letter === '[') return elementsAt(reader, name, depth);
  if (letter === '"')
    return [{ name, attributes: {}, text: stringAt(reader), line: place.line, column: place.column + 1, children: [] }];
  const scalar = token(reader, SCALAR);
  return [{ name, attributes: {}, text: scalar === 'null' ? '' : scalar, ...place, children: [] }];
}

function membersAt(reader: Reader, depth: number): DataNode[] {
  expect(reader, '{');
  const children: DataNode[] = [];
  skip(reader);
  if (reader.text[reader.at] === '}') {
    reader.at += 1;
    return children;
  }
  for (;;) {
    skip(reader);
    const name = stringAt(reader);
    skip(reader);
    expect(reader, ':');
    children.push(...valuesAt(reader, name, depth + 1));
    skip(reader);
    if (reader.text[reader.at] === ',') reader.at += 1;
    else {
      expect(reader, '}');
      return children;
    }
  }
}

function elementsAt(reader: Reader, name: string, depth: number): DataNode[] {
  expect(reader, '[');
  const nodes: DataNode[] = [];
  skip(reader);
  if (reader.text[reader.at] === ']') {
    reader.at += 1;
    return nodes;
  }
  for (;;) {
    nodes.push(...valuesAt(reader, name, depth + 1));
    skip(reader);
    if (reader.text[reader.at] === ',') reader.at += 1;
    else {
      expect(reader, ']');
      return nodes;
    }
  }
}

/** JSON with the place of every value, which the language's own parser does not tell. Depth and size are bounded. */
export function jsonTree(text: string): JsonTree {
  const reader: Reader = { text: text.replace(/^\ufeff/, ' '), at: 0, line: 1, start: 0, parts: 0 };
  try {
    const nodes = valuesAt(reader, 'root', 0);
    skip(reader);
    if (reader.at < reader.text.length) return { ok: false, reason: 'broken-json' };
    const [root] = nodes;
    if (root === undefined || nodes.length > 1)
      return { ok: true, root: { name: 'root', attributes: {}, text: '', line: 1, column: 1, children: nodes } };
    return { ok: true, root };
  } catch (error) {
    if (error instanceof Stop) return { ok: false, reason: error.why };
    throw error;
  }
}
