export { chainOf } from './chain.service.ts';
export { chainRoutes } from './chains.routes.ts';
export { storeOf } from './store-of.ts';
export { judgeUnissued } from './judge-unissued.ts';
export type { StoredValue } from './stored.ts';
