import { Start1796126146389 } from './1796126146389-start';
import { AddDrawingSplitHanging1796138875411 } from './1796138875411-add-drawing-split-hanging';

/** In the order in which they run. */
export const MIGRATIONS = [Start1796126146389, AddDrawingSplitHanging1796138875411];
