export { downstreamRoutes } from './downstream.routes.ts';
export { graphBelow, graphFromDatabase, memoryOf } from './graph-memory.ts';
