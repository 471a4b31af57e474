export { splitRoutes } from './split.routes';
