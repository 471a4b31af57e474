import { useMemo, useState } from 'react';
import type { FrameView } from '../../../shared/contracts/frames';
import type { StepRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { ChoiceRow, DimensionHead } from '../../components/ui/heads';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { counted, formatDuration } from '../../lib/formats';
import { useLiveMap } from '../../lib/live';
import { CreatePiecesForm } from './create-pieces-form';
import { PiecesTable } from './pieces-table';
import { useTemplates } from './queries';

function useTravellers(installationId: string): ReadonlyMap<string, readonly StepRecord[]> {
  const steps = useLiveMap(installationId, 'steps');
  return useMemo(() => {
    const byPiece = new Map<string, StepRecord[]>();
    for (const step of steps.values()) {
      if (step.removed) continue;
      const list = byPiece.get(step.subAssemblyId);
      if (list) list.push(step);
      else byPiece.set(step.subAssemblyId, [step]);
    }
    for (const list of byPiece.values()) list.sort((a, b) => a.position - b.position);
    return byPiece;
  }, [steps]);
}

/** All pieces of an installation, and the way to make more of them. */
export function PiecesDesk({
  installationId,
  frames,
  closed,
}: {
  installationId: string;
  frames: readonly FrameView[];
  closed: boolean;
}) {
  const records = useLiveMap(installationId, 'subAssemblies');
  const stepsOf = useTravellers(installationId);
  const templates = useTemplates(installationId);
  const [letter, setLetter] = useState('');
  const all = useMemo(
    () =>
      [...records.values()].filter((piece) => !piece.removed).sort((a, b) => a.code.localeCompare(b.code)),
    [records],
  );
  const codes = useMemo(() => [...records.values()].map(({ code }) => code), [records]);
  const letters = [...new Set(all.map(({ code }) => code.split('-')[0] ?? ''))];
  const chosen = letters.includes(letter) ? letter : '';
  const shown = chosen === '' ? all : all.filter(({ code }) => code.startsWith(`${chosen}-`));
  const seconds = shown.reduce(
    (sum, piece) => sum + (stepsOf.get(piece.id) ?? []).reduce((of, step) => of + step.plannedSeconds, 0),
    0,
  );
  return (
    <div className="with-side">
      <section className="grid content-start gap-4" aria-labelledby="pieces">
        <DimensionHead
          id="pieces"
          right={
            shown.length === 0
              ? undefined
              : `${counted(shown.length, 'piece')}, ${formatDuration(seconds)} of hands`
          }
        >
          Pieces
        </DimensionHead>
        {!closed && (
          <p className="wide:hidden">
            <a href="#make-pieces" className="words-link">
              Make pieces
            </a>
          </p>
        )}
        {letters.length > 1 && (
          <ChoiceRow
            label="letter of the code"
            value={chosen}
            onChange={setLetter}
            choices={[
              { value: '', label: 'All' },
              ...letters.map((one) => ({ value: one, label: `${one}-` })),
            ]}
          />
        )}
        {shown.length > 0 ? (
          <PiecesTable
            installationId={installationId}
            pieces={shown}
            stepsOf={stepsOf}
            frames={frames}
            closed={closed}
          />
        ) : (
          <EmptyNote title="No piece yet.">
            A piece is what a crew claims, builds and carries: a frame, a code and a traveller of steps.
          </EmptyNote>
        )}
      </section>
      {!closed && (
        <section className="grid content-start gap-4" aria-labelledby="make-pieces">
          <DimensionHead id="make-pieces">Make pieces</DimensionHead>
          <Refusal error={templates.error} />
          {templates.isPending ? (
            <Pending />
          ) : frames.every((frame) => frame.source.kind === 'piece') ? (
            <Missing what="frame" to={`/i/${installationId}/drawing`} where="Draw a frame" />
          ) : !templates.data || templates.data.length === 0 ? (
            <Missing what="template" to={`/i/${installationId}/templates`} where="Make a template" />
          ) : (
            <CreatePiecesForm
              installationId={installationId}
              frames={frames.filter((frame) => frame.source.kind !== 'piece')}
              templates={templates.data}
              codes={codes}
            />
          )}
        </section>
      )}
    </div>
  );
}

const Missing = ({ what, to, where }: { what: string; to: string; where: string }) => (
  <EmptyNote title={`There is no ${what} yet.`}>
    <p className="mb-2">Pieces are made from a frame and a template.</p>
    <Action to={to}>{where}</Action>
  </EmptyNote>
);
