import type { z } from 'zod';
import { uuidV7 } from '#shared/ids.ts';
import { ApiProblem, type ProblemDocument } from './api-problem.ts';
import { noteLost, noteReached } from './connection-state.ts';

type Query = Record<string, string | number | boolean | null | undefined>;

interface RequestOptions {
  query?: Query;
  signal?: AbortSignal;
}

/** Reads. @throws ApiProblem */
export function get<Schema extends z.ZodType>(
  path: string,
  response: Schema,
  options: RequestOptions = {},
): Promise<z.output<Schema>> {
  return request('GET', path, undefined, response, options);
}

/** A file that the register made, and what it is called. */
export interface ReceivedFile {
  blob: Blob;
  name: string;
}

/** Reads a file. @throws ApiProblem */
export async function getFile(path: string, { query, signal }: RequestOptions = {}): Promise<ReceivedFile> {
  const requestId = newRequestId();
  const headers = new Headers({ 'X-Request-Id': requestId });
  const answer = await reach(address(path, query), { headers, ...(signal && { signal }) }, requestId);
  if (!answer.ok) throw refusal(answer, await readJson(answer), requestId);
  const encoded = /filename\*=UTF-8''([^;]+)/.exec(answer.headers.get('Content-Disposition') ?? '')?.[1];
  return { blob: await answer.blob(), name: decodeURIComponent(encoded ?? 'document') };
}

/** Adds or acts. The body is JSON unless it is a file, which travels as it is. @throws ApiProblem */
export function post<Schema extends z.ZodType>(
  path: string,
  body: unknown,
  response: Schema,
  options: RequestOptions = {},
): Promise<z.output<Schema>> {
  return request('POST', path, body, response, options);
}

/** Replaces. @throws ApiProblem */
export function put<Schema extends z.ZodType>(
  path: string,
  body: unknown,
  response: Schema,
  options: RequestOptions = {},
): Promise<z.output<Schema>> {
  return request('PUT', path, body, response, options);
}

/** Changes in part: what is left out stays, null clears. @throws ApiProblem */
export function patch<Schema extends z.ZodType>(
  path: string,
  body: unknown,
  response: Schema,
  options: RequestOptions = {},
): Promise<z.output<Schema>> {
  return request('PATCH', path, body, response, options);
}

/** Removes or ends. @throws ApiProblem */
export function remove<Schema extends z.ZodType>(
  path: string,
  response: Schema,
  options: RequestOptions = {},
): Promise<z.output<Schema>> {
  return request('DELETE', path, undefined, response, options);
}

/** The address of a request, its empty parameters left out; also for links to files and exports. */
export function address(path: string, query: Query = {}): string {
  const parameters = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== null && value !== undefined && value !== '') parameters.set(name, String(value));
  }
  const text = parameters.toString();
  return text === '' ? path : `${path}?${text}`;
}

async function request<Schema extends z.ZodType>(
  method: string,
  path: string,
  body: unknown,
  response: Schema,
  { query, signal }: RequestOptions,
): Promise<z.output<Schema>> {
  const requestId = newRequestId();
  const isFile = body instanceof Blob;
  const headers = new Headers({ Accept: 'application/json', 'X-Request-Id': requestId });
  // A foreign page cannot set this header without asking first: that is what the server checks.
  if (method !== 'GET') headers.set('X-Requested-With', 'exagium');
  if (body !== undefined)
    headers.set('Content-Type', isFile ? body.type || 'application/octet-stream' : 'application/json');
  const payload = body === undefined ? undefined : isFile ? body : JSON.stringify(body);
  const answer = await reach(address(path, query), { method, headers, body: payload, signal }, requestId);
  const json = await readJson(answer);
  if (!answer.ok) throw refusal(answer, json, requestId);
  const parsed = response.safeParse(json);
  if (parsed.success) return parsed.data;
  throw new ApiProblem({
    type: '/problems/unexpected-answer',
    title: 'The answer was not understood',
    status: answer.status,
    detail: `${method} ${path} was answered in a form this version does not know. Reload the page to get the newest version.`,
    instance: requestId,
    issues: parsed.error.issues,
  });
}

async function reach(url: string, init: RequestInit, requestId: string): Promise<Response> {
  try {
    const answer = await fetch(url, { ...init, credentials: 'same-origin' });
    noteReached();
    return answer;
  } catch (error) {
    if (init.signal?.aborted) throw error;
    noteLost();
    throw new ApiProblem({
      type: '/problems/unreachable',
      title: 'The register cannot be reached',
      status: 0,
      detail:
        'Nothing was saved. What you typed is kept in this browser; try again when the connection is back.',
      instance: requestId,
    });
  }
}

async function readJson(answer: Response): Promise<unknown> {
  if (answer.status === 204) return null;
  try {
    return await answer.json();
  } catch {
    return undefined;
  }
}

function refusal(answer: Response, json: unknown, requestId: string): ApiProblem {
  if (typeof json === 'object' && json !== null && 'title' in json && 'type' in json) {
    return new ApiProblem({ instance: requestId, ...json, status: answer.status } as ProblemDocument);
  }
  return new ApiProblem({
    type: '/problems/internal',
    title: 'The server failed',
    status: answer.status,
    detail: `It answered ${answer.status} without saying why. Nothing more is known here; try again in a moment.`,
    instance: requestId,
  });
}

/** Identifiers are version 7 everywhere; `crypto.randomUUID` is missing on plain http beyond this machine. */
function newRequestId(): string {
  return uuidV7(Date.now(), crypto.getRandomValues(new Uint8Array(10)));
}
