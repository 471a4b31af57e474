import { Start1796126146389 } from './1796126146389-start';

/** In the order in which they run. */
export const MIGRATIONS = [Start1796126146389];
