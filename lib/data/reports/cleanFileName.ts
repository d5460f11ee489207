const LONGEST = 120;

/** The name is only ever shown: path parts, control and direction marks go, the ending stays when it must be cut. */
export function cleanFileName(given: string): string {
  const last = given.split(/[/\\]/).at(-1) ?? '';
  const plain = last
    .normalize('NFC')
    .replace(/[\p{Cc}\p{Cf}\u2028\u2029]/gu, ' ')
    .replace(/\s+/g, ' ')
    .trim()
    .replace(/^\.+/, '');
  if (plain === '') return 'report';
  const characters = [...plain];
  if (characters.length <= LONGEST) return plain;
  const ending = /\.[a-z0-9]{1,5}$/i.exec(plain)?.[0] ?? '';
  return characters.slice(0, LONGEST - ending.length).join('') + ending;
}

export const endingOf = (fileName: string): string => /\.([a-z0-9]{1,5})$/i.exec(fileName)?.[1]?.toLowerCase() ?? '';
