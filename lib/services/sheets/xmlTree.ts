import { SaxesParser } from 'saxes';

/** As the reader of laboratory data takes it: name, own text and its place, parts. */
type XmlNode = {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  text: string;
  readonly line: number;
  readonly column: number;
  readonly children: XmlNode[];
};
export type XmlTree =
  | { readonly ok: true; readonly root: XmlNode }
  | {
      readonly ok: false;
      readonly reason: 'xml-declares-entities' | 'nested-too-deep' | 'broken-xml' | 'table-too-large';
    };

/** Laboratory data nests about ten deep. */
const DEEPEST = 60;
const MOST_PARTS = 400_000;

class Stop extends Error {
  constructor(readonly why: Exclude<XmlTree, { ok: true }>['reason']) {
    super(why);
  }
}

const local = (name: string) => name.slice(name.indexOf(':') + 1);

/**
 * XML text as a tree. A document type is refused wherever it stands, so there are no entities but the five of the
 * language, nothing is fetched and nothing expands. Depth and number of parts are bounded. Called only in the process
 * that is killed past its limits.
 */
export function xmlTree(text: string): XmlTree {
  if (/<!(doctype|entity)\b/i.test(text)) return { ok: false, reason: 'xml-declares-entities' };
  const parser = new SaxesParser({ position: true });
  const open: XmlNode[] = [];
  const roots: XmlNode[] = [];
  let parts = 0;
  parser.on('error', (error) => {
    throw error;
  });
  parser.on('doctype', () => {
    throw new Stop('xml-declares-entities');
  });
  parser.on('opentag', (tag) => {
    parts += 1;
    if (parts > MOST_PARTS) throw new Stop('table-too-large');
    if (open.length >= DEEPEST) throw new Stop('nested-too-deep');
    const attributes = Object.fromEntries(
      Object.entries(tag.attributes).map(([name, value]) => [local(name), String(value)]),
    );
    const node: XmlNode = {
      name: local(tag.name),
      attributes,
      text: '',
      line: parser.line,
      column: parser.column + 1,
      children: [],
    };
    (open[open.length - 1]?.children ?? roots).push(node);
    open.push(node);
  });
  parser.on('closetag', () => {
    open.pop();
  });
  const add = (more: string) => {
    const node = open[open.length - 1];
    if (node !== undefined) node.text += more;
  };
  parser.on('text', add);
  parser.on('cdata', add);
  try {
    parser.write(text.replace(/^\ufeff/, '')).close();
  } catch (error) {
    return { ok: false, reason: error instanceof Stop ? error.why : 'broken-xml' };
  }
  const [root] = roots;
  return root === undefined ? { ok: false, reason: 'broken-xml' } : { ok: true, root };
}
