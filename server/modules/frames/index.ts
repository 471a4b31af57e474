export { framesRoutes } from './frames.routes';
export { Frame } from './frame.entity';
export { drawingOf, loadDrawingRevision } from './drawing.repository';
export { framesOf, loadFrame } from './frames.repository';
