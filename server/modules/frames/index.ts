export { framesRoutes } from './frames.routes';
export { loadFrame } from './frames.repository';
