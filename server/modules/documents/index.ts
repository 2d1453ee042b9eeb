export { addDocument } from './document.service.ts';
export { documentById } from './document.queries.ts';
export { documentRoutes } from './documents.routes.ts';
