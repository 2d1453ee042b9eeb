import type { Response } from 'express';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { attachmentDisposition } from '#server/modules/documents/index.ts';
import { focusOf } from './statement.ts';

const MEDIA_TYPES = {
  svg: 'image/svg+xml; charset=utf-8',
  pdf: 'application/pdf',
  json: 'application/json; charset=utf-8',
  html: 'text/html; charset=utf-8',
} as const;

/** Digits of a hash in a file's name: enough to tell files apart at sight and to notice an exchange. */
const HASH_DIGITS = 16;

/** A document that is taken along, and what its name is made of. */
export interface TakenFile {
  chain: ChainResponse;
  called: 'chain' | 'strip' | 'statement';
  extension: keyof typeof MEDIA_TYPES;
  body: string | Buffer;
  /** Named in the file's name where the file says it. */
  sha256?: string;
}

/** Sends it to be saved, never to be shown by the register's own origin. */
export function sendFile({ chain, called, extension, body, sha256 }: TakenFile, response: Response): void {
  const hash = sha256 ? ` ${sha256.slice(0, HASH_DIGITS)}` : '';
  const name = `${focusOf(chain).registryNo} ${called} ${chain.question.day}${hash}`;
  response.setHeader('Content-Type', MEDIA_TYPES[extension]);
  response.setHeader('Content-Disposition', attachmentDisposition(name, extension));
  response.setHeader('X-Content-Type-Options', 'nosniff');
  response.setHeader('Cache-Control', 'no-store');
  response.end(body);
}
