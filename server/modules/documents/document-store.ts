import { createHash, randomUUID } from 'node:crypto';
import { mkdir, open, readFile, rename, rm, stat } from 'node:fs/promises';
import path from 'node:path';
import { AppError } from '#server/http/app-error.ts';

/**
 * Keeps a content under its SHA-256, once. Written beside its place and moved there when complete: a reader
 * or a power cut never meets half a document.
 */
export async function keepContent(dataDir: string, content: Buffer): Promise<string> {
  const sha256 = hashOf(content);
  const place = placeOf(dataDir, sha256);
  if (await isKept(place, content.length)) return sha256;
  await mkdir(path.dirname(place), { recursive: true });
  const beside = `${place}.${randomUUID()}.part`;
  try {
    const file = await open(beside, 'wx', 0o640);
    try {
      await file.writeFile(content);
      await file.sync();
    } finally {
      await file.close();
    }
    await rename(beside, place);
  } finally {
    await rm(beside, { force: true });
  }
  return sha256;
}

/**
 * Reads a content back and checks it against its name.
 * @throws AppError `unavailable` where it is missing or is not what was kept
 */
export async function readContent(dataDir: string, sha256: string): Promise<Buffer> {
  try {
    const content = await readFile(placeOf(dataDir, sha256));
    if (hashOf(content) === sha256) return content;
  } catch (cause) {
    throw new AppError(
      'unavailable',
      `The document ${sha256} is missing from the store; tell the operator.`,
      { cause },
    );
  }
  throw new AppError('unavailable', `The document ${sha256} is not what was kept; tell the operator.`);
}

function hashOf(content: Buffer): string {
  return createHash('sha256').update(content).digest('hex');
}

/** Two letters of the hash make the folder, so that no folder grows without bound. */
function placeOf(dataDir: string, sha256: string): string {
  return path.join(dataDir, 'documents', sha256.slice(0, 2), sha256);
}

async function isKept(place: string, size: number): Promise<boolean> {
  try {
    return (await stat(place)).size === size;
  } catch {
    return false;
  }
}
