import type { CreateFrame } from '../../../shared/contracts/frames';
import {
  buildShape,
  cutCount,
  jointCount,
  parseFrameCsv,
  parseObj,
  validateFrame,
  type Frame as Geometry,
  type ObjNote,
} from '../../../shared/frames';
import { newId } from '../../../shared/kernel/ids';
import type { WriteScope } from '../../db/write';
import { AppError, notFound } from '../../http/app-error';
import { assertOpen } from '../installations';
import { placementsOfFrame } from './drawing.repository';
import { guardFrameSize } from './drawing.service';
import { Frame } from './frame.entity';
import { loadFrame, touchPieces, usesOfFrame } from './frames.repository';

interface Built {
  source: Frame['source'];
  geometry: Geometry;
  notes: ObjNote[];
}

/** As many problems as a person can mend before they try again. */
const MOST_PROBLEMS = 50;

/** Geometry from what was typed or read; every fault of a file is named with its line, of a table with its row. */
function build(input: CreateFrame): Built {
  switch (input.kind) {
    case 'shape':
      return { source: { kind: 'shape', shape: input.shape }, geometry: buildShape(input.shape), notes: [] };
    case 'obj':
      return readFile('OBJ_INVALID', input, parseObj(input.text));
    case 'csv':
      return readFile('CSV_INVALID', input, parseFrameCsv(input.text));
    case 'table':
      guardTable(input.geometry);
      return { source: { kind: 'table' }, geometry: input.geometry, notes: [] };
  }
}

function readFile(
  code: 'OBJ_INVALID' | 'CSV_INVALID',
  { kind, fileName }: Extract<CreateFrame, { fileName: string }>,
  read: ReturnType<typeof parseObj> | ReturnType<typeof parseFrameCsv>,
): Built {
  if (read.ok) return { source: { kind, fileName }, geometry: read.value.frame, notes: read.value.notes };
  const count = read.refusal.length;
  throw new AppError(
    code,
    `${fileName} was not read: ${count === 1 ? 'one line is' : `${count} lines are`} wrong.`,
    {
      fields: read.refusal.map((problem) => ({ path: 'text', code: problem.code, message: problem.message })),
    },
  );
}

function guardTable(geometry: Geometry): void {
  const problems = validateFrame(geometry);
  if (problems.length === 0) return;
  const row = (at: number) => `.${at - 1}`;
  throw new AppError(
    'FRAME_INVALID',
    `The frame was not kept: ${problems.length === 1 ? 'one thing is' : `${problems.length} things are`} wrong with its joints and struts.`,
    {
      fields: problems.slice(0, MOST_PROBLEMS).map(({ code, message, joint, strut, face }) => ({
        path: `geometry${joint ? `.joints${row(joint)}` : strut ? `.struts${row(strut)}` : face ? `.faces${row(face)}` : ''}`,
        code,
        message,
      })),
    },
  );
}

/**
 * Add a frame from a shape's measures, a Wavefront OBJ file, a CSV of joints and struts, or a table of them.
 * @throws AppError OBJ_INVALID, CSV_INVALID with every fault of the file by line, FRAME_INVALID with those of a table by row
 */
export async function createFrame(
  scope: WriteScope,
  installationId: string,
  input: CreateFrame,
  id = newId(),
): Promise<{ id: string; notes: ObjNote[] }> {
  await assertOpen(scope, installationId);
  const { source, geometry, notes } = build(input);
  await scope.manager.insert(Frame, {
    id,
    installationId,
    name: input.name,
    source,
    geometry,
    revision: await scope.revision(),
    removedAt: null,
  });
  await scope.log({ action: 'frame.added', subject: { frameId: id, kind: input.kind } });
  return { id, notes };
}

/** What an organiser is told of a changed frame. */
export interface EditedFrame {
  id: string;
  notes: ObjNote[];
  /** Pieces whose travellers show the new drawing, under their next revision. */
  pieces: number;
  /** Cuts or joints are others, so the planned minutes of those pieces are still the old frame's. */
  minutesStay: boolean;
}

/**
 * Change a frame's name, measures or file. Where its geometry changes, the travellers of its pieces get their next
 * revision, since a printed one shows another drawing; their planned minutes stay as they were planned.
 * @throws AppError STALE_PAGE when somebody changed it since the page was loaded, IN_USE when its geometry would change under pieces on
 *   which work has begun, VALIDATION when its copies in the drawing would be too many struts, and as `createFrame`
 */
export async function editFrame(
  scope: WriteScope,
  installationId: string,
  id: string,
  input: CreateFrame,
): Promise<EditedFrame> {
  await assertOpen(scope, installationId);
  const known = await loadFrame(scope.manager, installationId, id);
  if (!known) throw notFound();
  if (input.revision !== undefined && input.revision !== known.revision) {
    throw new AppError(
      'STALE_PAGE',
      `Somebody changed the frame ${known.name} meanwhile. Load it again; yours was not saved.`,
      { details: { revision: known.revision } },
    );
  }
  const { source, geometry, notes } = build(input);
  const changed = JSON.stringify(geometry) !== JSON.stringify(known.geometry);
  const { begun } = changed ? await usesOfFrame(scope.manager, id) : { begun: 0 };
  if (begun > 0) {
    throw new AppError(
      'IN_USE',
      `Work has begun on ${counted(begun)} of this frame, so its shape stays. Make a new frame beside it.`,
      { details: { begun } },
    );
  }
  await guardFrameSize(scope, installationId, id, geometry.struts.length);
  const revision = await scope.revision();
  await scope.manager.update(Frame, { id }, { name: input.name, source, geometry, revision });
  // Pieces are drawn from their frame: their screens fetch it again.
  const pieces = await touchPieces(scope.manager, id, revision, changed);
  for (const pieceId of pieces) scope.changed('subAssemblies', pieceId);
  await scope.log({ action: 'frame.edited', subject: { frameId: id, geometry: changed } });
  const minutesStay =
    pieces.length > 0 &&
    (cutCount(geometry) !== cutCount(known.geometry) || jointCount(geometry) !== jointCount(known.geometry));
  return { id, notes, pieces: changed ? pieces.length : 0, minutesStay };
}

const counted = (pieces: number) => `${pieces} ${pieces === 1 ? 'piece' : 'pieces'}`;

/**
 * Take a frame out of the plan.
 * @throws AppError IN_USE while pieces are made from it
 */
export async function removeFrame(
  scope: WriteScope,
  installationId: string,
  id: string,
): Promise<{ id: string }> {
  await assertOpen(scope, installationId);
  if (!(await loadFrame(scope.manager, installationId, id))) throw notFound();
  const { pieces } = await usesOfFrame(scope.manager, id);
  if (pieces > 0) {
    throw new AppError(
      'IN_USE',
      `${counted(pieces)} ${pieces === 1 ? 'is' : 'are'} made from this frame, so it stays. Take ${pieces === 1 ? 'it' : 'them'} out first.`,
      {
        details: { pieces },
      },
    );
  }
  const places = await placementsOfFrame(scope.manager, id);
  if (places > 0) {
    throw new AppError(
      'IN_USE',
      `This frame stands in the drawing at ${places} ${places === 1 ? 'place' : 'places'}, so it stays. Take it out of the drawing first.`,
      { details: { places } },
    );
  }
  await scope.manager.update(Frame, { id }, { removedAt: scope.now, revision: await scope.revision() });
  await scope.log({ action: 'frame.removed', subject: { frameId: id } });
  return { id };
}
