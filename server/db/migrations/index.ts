import { Start1796126146389 } from './1796126146389-start';
import { AddDrawingAndSplit1796142345794 } from './1796142345794-add-drawing-and-split';

/** In the order in which they run. */
export const MIGRATIONS = [Start1796126146389, AddDrawingAndSplit1796142345794];
