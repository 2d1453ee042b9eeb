/** Left out of names: path separators, quotes, control and format characters (they could hide the extension). */
const UNSAFE = /[\p{C}"'`\\/:*?<>|;]/gu;

/** A name that no file system and no header trips over; it ends in `.pdf`. */
export function safePdfName(name: string): string {
  return safeFileName(name, 'pdf');
}

/** A name that no file system and no header trips over, with its extension said once. */
function safeFileName(name: string, extension: string): string {
  const clean = name.normalize('NFC').replace(UNSAFE, ' ');
  const isExtended = clean.toLowerCase().endsWith(`.${extension}`);
  const bare = (isExtended ? clean.slice(0, -extension.length - 1) : clean)
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  // By characters, not halves of them.
  return `${[...bare].slice(0, 120).join('') || 'document'}.${extension}`;
}

/** The header of a document that a browser may show. */
export function contentDisposition(name: string): string {
  return disposition('inline', safePdfName(name));
}

/** The header of a file that is taken along: a browser saves it and shows nothing. */
export function attachmentDisposition(name: string, extension: string): string {
  return disposition('attachment', safeFileName(name, extension));
}

/** The header's value: plain ASCII for old readers, the whole name for the others (RFC 6266, RFC 8187). */
function disposition(kind: 'inline' | 'attachment', safe: string): string {
  const ascii = safe.replace(/[^\x20-\x7e]/g, '_').replaceAll('%', '_');
  const encoded = encodeURIComponent(safe).replace(
    /[!'()*]/g,
    (mark) => `%${mark.charCodeAt(0).toString(16)}`,
  );
  return `${kind}; filename="${ascii}"; filename*=UTF-8''${encoded}`;
}
