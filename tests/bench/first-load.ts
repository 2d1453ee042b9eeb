import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { gzipSync } from 'node:zlib';

const STATIC_IMPORT = /(?:\bfrom|\bimport)\s*["']\.\/([\w.-]+\.js)["']/g;
const DYNAMIC_IMPORT = /\bimport\(\s*[`"']\.\/([\w.-]+\.js)[`"']\s*\)/g;

/** Kilobytes (1000 bytes) of JavaScript, gzip, that a browser fetches before it shows a screen. */
export interface FirstLoad {
  /** Entry and everything it imports. */
  entry: number;
  /** Each screen with the entry, largest first; what a screen fetches later (the chain's drawing) is left out. */
  screens: { chunk: string; kilobytes: number }[];
}

/**
 * Reads the built client: follows static imports from the page's scripts, and from each module that the router
 * fetches for a screen.
 * @param folder of the built client
 */
export function firstLoad(folder: string): FirstLoad {
  const assets = path.join(folder, 'assets');
  const sources = new Map(
    readdirSync(assets)
      .filter((name) => name.endsWith('.js'))
      .map((name) => [name, readFileSync(path.join(assets, name), 'utf8')]),
  );
  const page = readFileSync(path.join(folder, 'index.html'), 'utf8');
  const scripts = [...page.matchAll(/assets\/([\w.-]+\.js)/g)].map((match) => match[1]!);
  const first = new Set(scripts.flatMap((name) => [...closure(name, sources)]));
  // The page's first module may fetch the application itself, so that the theme is set before anything is drawn.
  const application = scripts.flatMap((name) => importsOf(name, sources, DYNAMIC_IMPORT));
  for (const name of application) for (const each of closure(name, sources)) first.add(each);
  const screens = [...first].flatMap((name) => importsOf(name, sources, DYNAMIC_IMPORT));
  return {
    entry: size(first, sources),
    screens: [...new Set(screens)]
      .filter((name) => !first.has(name))
      .map((name) => ({
        chunk: name,
        kilobytes: size(new Set([...first, ...closure(name, sources)]), sources),
      }))
      .sort((a, b) => b.kilobytes - a.kilobytes),
  };
}

function closure(name: string, sources: ReadonlyMap<string, string>): Set<string> {
  const found = new Set([name]);
  // The set grows while it is walked.
  for (const each of found) for (const next of importsOf(each, sources, STATIC_IMPORT)) found.add(next);
  return found;
}

function importsOf(name: string, sources: ReadonlyMap<string, string>, pattern: RegExp): string[] {
  const source = sources.get(name);
  if (source === undefined) return [];
  return [...source.matchAll(pattern)].map((match) => match[1]!).filter((next) => sources.has(next));
}

function size(names: ReadonlySet<string>, sources: ReadonlyMap<string, string>): number {
  const bytes = [...names].reduce((sum, name) => sum + gzipSync(sources.get(name) ?? '').length, 0);
  return bytes / 1000;
}
