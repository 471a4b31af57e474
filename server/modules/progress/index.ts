export { progressRoutes } from './progress.routes';
