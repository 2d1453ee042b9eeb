export { addDocument } from './document.service.ts';
export { documentById } from './document.queries.ts';
export { attachmentDisposition } from './file-name.ts';
export { documentRoutes } from './documents.routes.ts';
