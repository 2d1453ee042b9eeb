export { noticeRoutes } from './notices.routes.ts';
export { publishNotice } from './publish-notice.service.ts';
