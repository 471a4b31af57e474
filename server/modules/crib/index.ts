export { cribLive } from './crib.live';
export { cribRoutes } from './crib.routes';
