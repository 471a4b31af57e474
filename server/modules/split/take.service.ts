import type { TemplateStep } from '../../../shared/contracts/travellers';
import type {
  SplitMeeting,
  SplitOrigin,
  SplitPiece,
  SplitPlan,
  SplitView,
  StrutKey,
  TakeSplit,
} from '../../../shared/contracts/split';
import { cutCount, jointCount } from '../../../shared/frames';
import { newId } from '../../../shared/kernel/ids';
import { splitChanges, type PieceChange, type TouchedPiece } from '../../../shared/split';
import type { WriteScope } from '../../db/write';
import { AppError, fieldError } from '../../http/app-error';
import { Frame } from '../frames';
import { assertOpen } from '../installations';
import {
  codeOf,
  highestNumber,
  insertPieces,
  loadTemplate,
  redrawPiece,
  rehomePiece,
  retirePiece,
  type NewPiece,
} from '../travellers';
import { Split } from './split.entity';
import { loadProposal, splitPieces, stepsOfPieces, type SplitPieceRow } from './split.repository';
import { currentOf } from './split.service';

/** Letter of the field joints' codes; pieces may not have it. */
export const JOINT_LETTER = 'J';
/** Above this a joint is glued from a ladder, mm over the drawing's lowest point. */
const REACH_MM = 2000;
const HIGHEST_NUMBER = 999;

/** What an organiser is told when travellers have been made. */
export interface TakenSplit {
  added: string[];
  redrawn: string[];
  unchanged: number;
  removed: string[];
  fieldJoints: number;
  /** Field joints on which work has begun and which the split does not have any more. */
  leftOver: string[];
}

/** A strut's key as text, to compare. */
export const textOf = (key: StrutKey): string => key.join('/');

/**
 * What taking a plan would change of the pieces that are there, and where it would touch work that has begun.
 * @param known sub-assemblies made from a split
 */
export async function changesOf(
  scope: Pick<WriteScope, 'manager'>,
  known: readonly SplitPieceRow[],
  plan: SplitPlan,
): Promise<{ changes: PieceChange[]; touched: TouchedPiece[] }> {
  const pieces = known.filter((row) => row.kind === 'piece');
  return splitChanges(
    pieces.map(({ id, code, origin }) => ({ id, code, struts: origin.struts.map(textOf) })),
    plan.pieces.map((piece) => ({ struts: strutsOf(plan, piece).map(textOf) })),
    await stepsOfPieces(
      scope.manager,
      pieces.map((piece) => piece.id),
    ),
  );
}

const strutsOf = (plan: SplitPlan, piece: SplitPiece): StrutKey[] =>
  piece.struts.map((strut) => plan.struts[strut] as StrutKey);

/**
 * Make travellers from the proposal: new pieces get one, changed pieces without work another drawing and the next revision, pieces that
 * are gone are taken out, and where pieces meet there is a field joint that waits for them.
 * @throws AppError STALE_PAGE, SPLIT_OUT_OF_DATE, SPLIT_WORK_BEGUN with the list, VALIDATION for a template or station that is gone
 */
export async function takeSplit(
  scope: WriteScope,
  installationId: string,
  input: TakeSplit,
): Promise<TakenSplit> {
  await assertOpen(scope, installationId);
  const proposal = currentOf(await loadProposal(scope.manager, installationId), input.revision);
  const template = await loadTemplate(scope.manager, installationId, input.templateId);
  if (!template)
    throw fieldError('templateId', 'unknown', 'This template is not there any more. Choose another one.');
  if (input.letter === JOINT_LETTER)
    throw fieldError(
      'letter',
      'taken',
      `${JOINT_LETTER} is the letter of the field joints. Take another one.`,
    );
  await guardStation(scope, installationId, input.stationId);
  const known = await splitPieces(scope.manager, installationId);
  const { changes, touched } = await changesOf(scope, known, proposal.plan);
  if (touched.length > 0) throw workBegun(touched);
  const making = new Making(scope, installationId, proposal, input, template);
  const taken = await making.pieces(changes, known);
  const joints = await making.fieldJoints(known);
  await closeSplits(scope, installationId, proposal.id);
  const outcome = { ...taken, ...joints };
  await scope.log({
    action: 'split.taken',
    subject: {
      splitId: proposal.id,
      added: outcome.added.length,
      redrawn: outcome.redrawn.length,
      removed: outcome.removed.length,
      fieldJoints: outcome.fieldJoints,
    },
  });
  return outcome;
}

export function workBegun(touched: readonly TouchedPiece[]): AppError {
  const codes = touched.map((piece) => piece.code);
  return new AppError(
    'SPLIT_WORK_BEGUN',
    `Work has begun on ${codes.join(', ')}, and this split would change ${codes.length === 1 ? 'it' : 'them'}. Leave what has begun as it is, or keep ${codes.length === 1 ? 'that piece' : 'those pieces'} and split again.`,
    { details: { touched } },
  );
}

async function guardStation(scope: WriteScope, installationId: string, stationId: string): Promise<void> {
  const rows = await scope.manager.query<{ id: string }[]>(
    'SELECT id FROM station WHERE id = ? AND installation_id = ? AND removed_at IS NULL',
    [stationId, installationId],
  );
  if (rows.length === 0)
    throw fieldError('stationId', 'unknown', 'This station is not there any more. Choose another one.');
}

/** The proposal is taken; what was taken before is replaced. */
async function closeSplits(scope: WriteScope, installationId: string, id: string): Promise<void> {
  const revision = await scope.revision();
  await scope.manager.update(Split, { installationId, status: 'taken' }, { status: 'replaced', revision });
  await scope.manager.update(Split, { id }, { status: 'taken', revision });
}

class Making {
  private readonly plan: SplitPlan;
  /** Frame of each group, made when its first piece needs it. */
  private readonly frames = new Map<number, string>();
  /** Sub-assembly of each piece, by the piece's key. */
  private readonly idOf = new Map<string, string>();

  constructor(
    private readonly scope: WriteScope,
    private readonly installationId: string,
    private readonly proposal: SplitView,
    private readonly input: TakeSplit,
    private readonly template: { id: string; steps: TemplateStep[] },
  ) {
    this.plan = proposal.plan;
  }

  async pieces(
    changes: readonly PieceChange[],
    known: readonly SplitPieceRow[],
  ): Promise<Pick<TakenSplit, 'added' | 'redrawn' | 'unchanged' | 'removed'>> {
    const taken = { added: [] as string[], redrawn: [] as string[], unchanged: 0, removed: [] as string[] };
    const rows = new Map(known.map((row) => [row.id, row]));
    const wanted: SplitPiece[] = [];
    for (const change of changes) {
      if (change.kind === 'gone') {
        await retirePiece(this.scope, change.id);
        taken.removed.push(change.code);
        continue;
      }
      const piece = this.plan.pieces[change.piece];
      if (!piece) throw new Error(`The split has no piece ${change.piece}.`);
      if (change.kind === 'new') {
        wanted.push(piece);
        continue;
      }
      this.idOf.set(piece.key, change.id);
      if (change.kind === 'unchanged' && rows.get(change.id)?.begun) {
        await rehomePiece(this.scope, change.id, this.originOf(piece));
        taken.unchanged += 1;
        continue;
      }
      await this.redraw(change.id, piece, rows.get(change.id)?.templateId ?? null);
      if (change.kind === 'unchanged') taken.unchanged += 1;
      else taken.redrawn.push(change.code);
    }
    taken.added = await this.add(wanted);
    return taken;
  }

  private async add(wanted: readonly SplitPiece[]): Promise<string[]> {
    const { letter, name } = this.input;
    const from = await highestNumber(this.scope.manager, this.installationId, letter);
    this.guardCodes(letter, from, wanted.length);
    const pieces: NewPiece[] = [];
    for (const [index, piece] of wanted.entries()) {
      const id = newId();
      this.idOf.set(piece.key, id);
      pieces.push({
        id,
        frameId: await this.frameOf(piece.group),
        code: codeOf(letter, from + index + 1),
        name: `${name} ${from + index + 1}`,
        position: from + index + 1,
        counts: this.countsOf(piece),
        origin: this.originOf(piece),
      });
    }
    await insertPieces(this.scope, this.installationId, pieces, this.template);
    return pieces.map((piece) => piece.code);
  }

  private guardCodes(letter: string, from: number, count: number): void {
    if (from + count <= HIGHEST_NUMBER) return;
    throw fieldError(
      'letter',
      'no-codes',
      `${letter} has ${Math.max(0, HIGHEST_NUMBER - from)} codes left, not ${count}. Take another letter.`,
    );
  }

  private async redraw(id: string, piece: SplitPiece, templateId: string | null): Promise<void> {
    const template =
      templateId === null || templateId === this.template.id
        ? this.template
        : ((await loadTemplate(this.scope.manager, this.installationId, templateId)) ?? this.template);
    await redrawPiece(
      this.scope,
      id,
      {
        frameId: await this.frameOf(piece.group),
        origin: this.originOf(piece),
        counts: this.countsOf(piece),
      },
      template.steps,
    );
  }

  private countsOf(piece: SplitPiece): NewPiece['counts'] {
    const frame = this.group(piece.group).frame;
    return { cuts: cutCount(frame), joints: jointCount(frame) };
  }

  private originOf(piece: SplitPiece): SplitOrigin {
    return {
      splitId: this.proposal.id,
      keys: [piece.key],
      mark: piece.mark,
      hand: piece.hand,
      motion: piece.motion,
      struts: strutsOf(this.plan, piece),
      joints: piece.joints,
      massKg: piece.massKg,
    };
  }

  private group(index: number): SplitPlan['groups'][number] {
    const group = this.plan.groups[index];
    if (!group) throw new Error(`The split has no group ${index}.`);
    return group;
  }

  private async frameOf(index: number): Promise<string> {
    const known = this.frames.get(index);
    if (known) return known;
    const id = newId();
    const revision = await this.scope.revision();
    const pieces = this.plan.pieces.filter((piece) => piece.group === index).length;
    await this.scope.manager.insert(Frame, {
      id,
      installationId: this.installationId,
      name: `${this.input.name}, pattern ${index + 1}${pieces > 1 ? ` (${pieces} alike)` : ''}`,
      source: { kind: 'piece', splitId: this.proposal.id, group: index },
      geometry: this.group(index).frame,
      revision,
      removedAt: null,
    });
    this.frames.set(index, id);
    return id;
  }

  /** One field joint for each two pieces that meet, in the order in which the site is put together. */
  async fieldJoints(known: readonly SplitPieceRow[]): Promise<Pick<TakenSplit, 'fieldJoints' | 'leftOver'>> {
    const old = known.filter((row) => row.kind === 'field joint');
    const left = new Map(old.map((row) => [pairKey(row.needs), row]));
    const from = await highestNumber(this.scope.manager, this.installationId, JOINT_LETTER);
    this.guardCodes(JOINT_LETTER, from, this.plan.meetings.length);
    let number = from;
    for (const meeting of this.plan.meetings) {
      const needs = [this.idOf.get(meeting.a), this.idOf.get(meeting.b)].filter((id) => id !== undefined);
      const row = left.get(pairKey(needs));
      if (row) {
        left.delete(pairKey(needs));
        await rehomePiece(this.scope, row.id, this.jointOrigin(meeting), needs);
        continue;
      }
      number += 1;
      await this.addJoint(meeting, needs, number);
    }
    const leftOver: string[] = [];
    for (const row of left.values()) {
      if (row.begun) leftOver.push(row.code);
      else await retirePiece(this.scope, row.id);
    }
    return { fieldJoints: this.plan.meetings.length, leftOver };
  }

  private async addJoint(meeting: SplitMeeting, needs: string[], number: number): Promise<void> {
    const high = meeting.heightMm > REACH_MM;
    await insertPieces(
      this.scope,
      this.installationId,
      [
        {
          id: newId(),
          frameId: '',
          code: codeOf(JOINT_LETTER, number),
          name: 'field joint',
          position: number,
          counts: { cuts: 0, joints: meeting.joints.length },
          kind: 'field joint',
          needs,
          origin: this.jointOrigin(meeting),
        },
      ],
      {
        id: null,
        steps: [
          {
            operation: 'other',
            name: 'join on site',
            stationId: this.input.stationId,
            // Common practice, no source: over head height somebody works from a ladder and somebody holds from below.
            hazards: high ? ['hot-glue', 'ladder', 'overhead'] : ['hot-glue'],
            toolKinds: high ? ['hot-glue gun', 'ladder'] : ['hot-glue gun'],
            crewMin: 2,
            crewMax: high ? 4 : 3,
            minutes: { fixed: high ? 6 : 3, perCut: 0, perJoint: high ? 3 : 2 },
            clocks: null,
            needsCheck: true,
          },
        ],
      },
    );
  }

  private jointOrigin(meeting: SplitMeeting): SplitOrigin {
    return {
      splitId: this.proposal.id,
      keys: [meeting.a, meeting.b],
      mark: null,
      hand: null,
      motion: null,
      struts: [],
      joints: meeting.joints,
      massKg: 0,
    };
  }
}

const pairKey = (ids: readonly string[]): string => [...ids].sort().join(' ');
