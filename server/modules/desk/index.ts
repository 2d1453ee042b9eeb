export { deskRoutes } from './desk.routes.ts';
