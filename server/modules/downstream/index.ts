export { downstreamRoutes } from './downstream.routes.ts';
export { readDownstream, type DownstreamSubject } from './downstream.policy.ts';
export { whatIfSubject } from './what-if-subject.ts';
export { graphBelow, graphFromDatabase, memoryOf } from './graph-memory.ts';
