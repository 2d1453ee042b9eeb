export { noticeRoutes } from './notices.routes.ts';
export { publishNotice, type PublishedNotice } from './publish-notice.service.ts';
export { noticesSince, ownWordsOf } from './show-notice.service.ts';
