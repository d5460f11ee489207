/** Where to go after signing in: a path of this site and nothing else, whatever the address bar was made to hold. */
export function safeNext(wanted: string | undefined): string {
  const home = '/today';
  // biome-ignore lint/suspicious/noControlCharactersInRegex: browsers drop them, which turns "/\t/evil" into "//evil"
  if (!wanted?.startsWith('/') || /^\/[/\\]|\\|[\u0000-\u0020]/.test(wanted)) return home;
  const here = 'http://loamline.invalid';
  const url = URL.canParse(wanted, here) ? new URL(wanted, here) : null;
  return url?.origin === here ? `${url.pathname}${url.search}${url.hash}` : home;
}
