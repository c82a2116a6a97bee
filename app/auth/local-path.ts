/**
 * A page of our own to go to afterwards, out of an address or a form; "/" for anything else. Read as a browser reads it:
 * it drops tabs and line breaks, takes a backslash for a slash and folds "/./", each of which can lead to another site.
 */
export function localPath(text: string | null | undefined): string {
  const home = "/";
  if (!text?.startsWith("/")) return home;
  const base = "http://own.invalid";
  if (!URL.canParse(text, base)) return home;
  const { origin, pathname, search, hash } = new URL(text, base);
  return origin === base && !pathname.startsWith("//") ? pathname + search + hash : home;
}
