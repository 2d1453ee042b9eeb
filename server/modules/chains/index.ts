export { chainNumbers } from './chain-numbers.ts';
export { chainOf } from './chain.service.ts';
export type { Closure } from './chain-store.ts';
export { chainSubject } from './chain-subject.queries.ts';
export { readChain, type ChainSubject } from './chains.policy.ts';
export { chainRoutes } from './chains.routes.ts';
export { storeOf } from './store-of.ts';
export { judgeUnissued } from './judge-unissued.ts';
export type { StoredValue } from './stored.ts';
