import { HAZARD_LABELS } from '../../../shared/safety';
import { Action } from '../../components/ui/action';
import { Figures } from '../../components/ui/figures';
import { formatDuration, listed } from '../../lib/formats';
import { StepFields, type StepFieldsProps } from './step-fields';
import type { DraftStep } from './template-draft';

export type StepRowProps = StepFieldsProps & {
  index: number;
  count: number;
  /** Planned seconds for the example; null while they cannot be told. */
  seconds: number | null;
  open: boolean;
  onToggle: () => void;
  onMove: (by: 1 | -1) => void;
  onRemove: () => void;
};

/** Ids of the buttons that move a step: they keep the focus when their step has moved. */
export const moveId = (key: string, by: 1 | -1): string => `${key}-${by === 1 ? 'down' : 'up'}`;

function facts(step: DraftStep, stations: StepRowProps['stations']): string {
  const station = stations.find(({ id }) => id === step.stationId)?.name ?? 'no station yet';
  const crew =
    step.crewMin === step.crewMax ? `crew ${step.crewMin}` : `crew ${step.crewMin} to ${step.crewMax}`;
  return [
    station,
    crew,
    ...(step.hazards.length > 0 ? [listed(step.hazards.map((hazard) => HAZARD_LABELS[hazard]))] : []),
    ...(step.tools.trim() ? [step.tools.trim()] : []),
    ...(step.dries ? [`dries ${step.clocks.touchDry || '?'} min`] : []),
    ...(step.needsCheck ? ['checked'] : []),
  ].join(' · ');
}

/** One step of a template: a line that says what it is, and its fields when it is opened. */
export function StepRow(props: StepRowProps) {
  const { step, index, count, seconds, open, onToggle, onMove, onRemove, stations } = props;
  const title = step.name.trim() || step.operation;
  const fieldsId = `${step.key}-fields`;
  return (
    <li className="template-step" aria-label={`Step ${index + 1}, ${title}`}>
      <span className="template-step-number" aria-hidden="true">
        {index + 1}
      </span>
      <div className="min-w-0">
        <p className="font-medium">{title}</p>
        <p className="text-small text-pencil">{facts(step, stations)}</p>
      </div>
      <span className="template-step-minutes">
        {seconds === null ? '?' : <Figures>{formatDuration(seconds)}</Figures>}
      </span>
      <span className="template-step-actions">
        <Action
          look="words"
          label={`${open ? 'Close' : 'Change'} ${title}`}
          expanded={open}
          controls={fieldsId}
          onClick={onToggle}
        >
          {open ? 'Close' : 'Change'}
        </Action>
        <MoveButton stepKey={step.key} by={-1} off={index === 0} title={title} onMove={onMove} />
        <MoveButton stepKey={step.key} by={1} off={index === count - 1} title={title} onMove={onMove} />
        <Action look="words" label={`Take out ${title}`} onClick={onRemove}>
          Take out
        </Action>
      </span>
      {open && (
        <div id={fieldsId} className="template-step-fields">
          <StepFields {...props} />
        </div>
      )}
    </li>
  );
}

function MoveButton({
  stepKey,
  by,
  off,
  title,
  onMove,
}: {
  stepKey: string;
  by: 1 | -1;
  off: boolean;
  title: string;
  onMove: (by: 1 | -1) => void;
}) {
  const up = by === -1;
  return (
    <button
      type="button"
      id={moveId(stepKey, by)}
      className="action move-button"
      data-look={off ? 'off' : 'plain'}
      disabled={off}
      aria-label={`${up ? 'Up' : 'Down'}: ${title}`}
      onClick={() => onMove(by)}
    >
      <svg width="14" height="14" viewBox="0 0 14 14" aria-hidden="true">
        <path
          d={up ? 'M7 13V2M2 7 7 2 12 7' : 'M7 1V12M2 7 7 12 12 7'}
          fill="none"
          stroke="currentColor"
          strokeWidth="1.6"
        />
      </svg>
    </button>
  );
}
