import type { routes } from '#server/routes.ts';
import type { Scene, Walker } from './scene.ts';
import type { WalkRequest, WalkRow } from './table.ts';

export type WalkedRoute = (typeof routes)[number];

/** A route's name in the table. */
export const nameOf = (route: { method: string; path: string }) =>
  `${route.method.toUpperCase()} ${route.path}`;

/** Sends a request as a walker. */
export async function send(
  scene: Scene,
  route: { method: WalkedRoute['method'] },
  row: Pick<WalkRow, 'endsSession'>,
  walker: Walker,
  { path, query, body, file }: WalkRequest,
) {
  const agent = row.endsSession ? await scene.freshAgent(walker) : scene.agent(walker);
  const request = agent[route.method](path).query(query ?? {});
  if (file) return request.set('Content-Type', 'application/pdf').send(file);
  return body === undefined ? request : request.send(body as object);
}
