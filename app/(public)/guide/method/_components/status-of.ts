/** `basis` names what is derived from published figures ("core, season derived; the rest assumed"); all else is our assumption. */
export function statusOf(basis: string, size: string): 'derived' | 'assumed' {
  const [named, ...rest] = basis.split(' derived');
  return rest.length > 0 && named?.split(', ').includes(size) ? 'derived' : 'assumed';
}
