/** A part of an XML or JSON file: its name, its own text and where that begins (line and character from 1), its parts. */
export type DataNode = {
  readonly name: string;
  readonly attributes: Readonly<Record<string, string>>;
  readonly text: string;
  readonly line: number;
  readonly column: number;
  readonly children: readonly DataNode[];
};

export function childrenOf(node: DataNode | undefined, name: string): readonly DataNode[] {
  return node?.children.filter((child) => child.name.toLowerCase() === name.toLowerCase()) ?? [];
}

export function childOf(node: DataNode | undefined, ...path: readonly string[]): DataNode | undefined {
  return path.reduce<DataNode | undefined>((at, name) => childrenOf(at, name)[0], node);
}

export function textAt(node: DataNode | undefined, ...path: readonly string[]): string | null {
  const text = childOf(node, ...path)?.text.trim() ?? '';
  return text === '' ? null : text;
}

/** The members of a list: `<Depths><Depth/><Depth/></Depths>` in XML, `"Depths": [ … ]` in JSON. */
export function listOf(node: DataNode | undefined, list: string, member: string): readonly DataNode[] {
  const lists = childrenOf(node, list);
  const inside = lists.flatMap((one) => childrenOf(one, member));
  if (inside.length > 0) return inside;
  return lists.length > 0 ? lists : childrenOf(node, member);
}
