/** Left out of names: path separators, quotes, control and format characters (they could hide the extension). */
const UNSAFE = /[\p{C}"'`\\/:*?<>|;]/gu;

/** A name that no file system and no header trips over; it ends in `.pdf`. */
export function safePdfName(name: string): string {
  const bare = name
    .normalize('NFC')
    .replace(UNSAFE, ' ')
    .replace(/\.pdf$/i, '')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  // By characters, not halves of them.
  return `${[...bare].slice(0, 120).join('') || 'document'}.pdf`;
}

/** The header's value: plain ASCII for old readers, the whole name for the others (RFC 6266, RFC 8187). */
export function contentDisposition(name: string): string {
  const safe = safePdfName(name);
  const ascii = safe.replace(/[^\x20-\x7e]/g, '_').replaceAll('%', '_');
  const encoded = encodeURIComponent(safe).replace(
    /[!'()*]/g,
    (mark) => `%${mark.charCodeAt(0).toString(16)}`,
  );
  return `inline; filename="${ascii}"; filename*=UTF-8''${encoded}`;
}
