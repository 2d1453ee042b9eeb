import { inflateSync } from 'node:zlib';

interface Indirect {
  body: string;
  stream: string | null;
}

/**
 * The text of a PDF that the product made, page by page: glyphs of its embedded fonts read back through the maps
 * that make a text copiable. Enough for what the product writes; no reader of other PDFs.
 */
export function pdfPages(pdf: Buffer): string[] {
  const objects = objectsOf(pdf);
  const pages = [...objects.values()].filter(({ body }) => /\/Type \/Page\b(?!s)/.test(body));
  return pages.map((page) => {
    const fonts = new Map(
      [...resourceText(page.body, objects).matchAll(/\/(F\d+) (\d+) 0 R/g)].map(([, name, id]) => [
        name!,
        glyphsOf(objects.get(id!)!, objects),
      ]),
    );
    const content = objects.get(/\/Contents (\d+) 0 R/.exec(page.body)![1]!)!.stream!;
    return textOf(content, fonts);
  });
}

/** Names of the fonts that are embedded, without the tag of the subset. */
export function pdfFonts(pdf: Buffer): string[] {
  const names = [...objectsOf(pdf).values()].flatMap(
    ({ body }) => /\/FontName \/\w{6}\+(\S+)/.exec(body)?.[1] ?? [],
  );
  return [...new Set(names)].sort();
}

function objectsOf(pdf: Buffer): Map<string, Indirect> {
  const text = pdf.toString('latin1');
  const found = new Map<string, Indirect>();
  for (const match of text.matchAll(/(\d+) 0 obj\n([\s\S]*?)\nendobj/g)) {
    const [, id, whole] = match as unknown as [string, string, string];
    const at = whole.indexOf('stream\n');
    const body = at < 0 ? whole : whole.slice(0, at);
    const raw = at < 0 ? null : Buffer.from(whole.slice(at + 7, whole.lastIndexOf('\nendstream')), 'latin1');
    const isPacked = body.includes('/FlateDecode');
    found.set(id, { body, stream: raw && (isPacked ? inflateSync(raw) : raw).toString('latin1') });
  }
  return found;
}

function resourceText(page: string, objects: Map<string, Indirect>): string {
  const reference = /\/Resources (\d+) 0 R/.exec(page);
  return reference ? objects.get(reference[1]!)!.body : page;
}

function glyphsOf(font: Indirect, objects: Map<string, Indirect>): string[] {
  const map = objects.get(/\/ToUnicode (\d+) 0 R/.exec(font.body)![1]!)!.stream!;
  return [...map.matchAll(/<[0-9a-f]{4}> <[0-9a-f]{4}> \[([^\]]*)\]/g)].flatMap(([, list]) =>
    [...list!.matchAll(/<([0-9a-f ]*)>/g)].map(([, codes]) =>
      codes === '' ? '' : Buffer.from(codes!.replaceAll(' ', ''), 'hex').swap16().toString('utf16le'),
    ),
  );
}

function textOf(content: string, fonts: Map<string, string[]>): string {
  let glyphs: string[] = [];
  let text = '';
  for (const [, name, shown] of content.matchAll(/\/(F\d+) [\d.]+ Tf|\[([^\]]*)\] TJ/g)) {
    if (name) glyphs = fonts.get(name)!;
    else
      for (const [, hex] of shown!.matchAll(/<([0-9a-f]+)>/g))
        for (const [code] of hex!.matchAll(/.{4}/g)) text += glyphs[parseInt(code, 16)] ?? '';
  }
  return text;
}
