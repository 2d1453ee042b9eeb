export { downstreamRoutes } from './downstream.routes.ts';
export { readDownstream, type DownstreamSubject } from './downstream.policy.ts';
export { whatIfSubject } from './what-if-subject.ts';
export { graphBelow, graphFromDatabase, memoryOf } from './graph-memory.ts';
export {
  noticeEffects,
  type CoveringNotice,
  type NoticeEffects,
  type NoticeFound,
} from './notice-effects.service.ts';
export { fullRow, warningRow } from './downstream.presenter.ts';
export { SIGHT } from './sight.ts';
export { WORDS } from './what-if-word.ts';
