import { useEffect, useRef, useState } from 'react';
import type { ToolRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { CheckField } from '../../components/ui/choices';
import { Field } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { ApiError } from '../../lib/api';
import { formatDuration } from '../../lib/formats';
import { useSend } from '../../lib/use-send';
import { readTool, toolProblem } from './scan';
import { ScanField } from './scan-field';
import type { Crib } from './use-crib';

interface Taken {
  tool: ToolRecord;
  from: string;
  /** How much too late, ms; 0 when it was in time. */
  lateMs: number;
  tagged: boolean;
}

interface HowBack {
  condition: string;
  tagReason: string | null;
  /** Called once it is back. */
  onBack?: () => void;
}

export interface TakeBack {
  take: (tool: ToolRecord, how?: HowBack) => void;
  /** The last tool that came back, until forgotten. */
  taken: Taken | null;
  error: unknown;
  busy: boolean;
  forget: () => void;
}

/** Takes tools back; that is always possible, during a stop too. */
export function useTakeBack(installationId: string, crib: Crib): TakeBack {
  const [taken, setTaken] = useState<Taken | null>(null);
  const send = useSend();
  return {
    taken,
    error: send.error,
    busy: send.isPending,
    forget: () => {
      setTaken(null);
      send.reset();
    },
    take: (tool, { condition, tagReason, onBack } = { condition: '', tagReason: null }) => {
      if (send.isPending) return;
      const checkout = crib.outOf.get(tool.id);
      setTaken(null);
      send.mutate(
        {
          method: 'POST',
          path: `/installations/${installationId}/tools/${tool.id}/take-back`,
          body: { condition, tagReason },
        },
        {
          onSuccess: () => {
            onBack?.();
            setTaken({
              tool,
              from: checkout ? crib.nameOf(checkout.personId) : '',
              lateMs: checkout ? Math.max(0, crib.now - checkout.backBy) : 0,
              tagged: tagReason !== null,
            });
          },
        },
      );
    },
  };
}

/** What came back just now. */
export function TakenBack({ takeBack }: { takeBack: TakeBack }) {
  const { taken, error } = takeBack;
  if (error) return <Refusal error={error} />;
  if (!taken) return null;
  const { tool, from, lateMs, tagged } = taken;
  return (
    <Note kind="done" title={`${tool.number} ${tool.name} is back${from ? ` from ${from}` : ''}.`}>
      {lateMs > 60_000 && <p>It was {formatDuration(lateMs / 1000)} over.</p>}
      {tagged && <p>It is tagged out of use.</p>}
    </Note>
  );
}

/** Back in one scan; what is wrong with the tool is said before it, and hangs a tag on it. */
export function TakeBackPanel({ installationId, crib }: { installationId: string; crib: Crib }) {
  const takeBack = useTakeBack(installationId, crib);
  const field = useRef<HTMLInputElement>(null);
  useEffect(() => field.current?.focus(), []);
  const [typed, setTyped] = useState('');
  const [condition, setCondition] = useState('');
  const [unsafe, setUnsafe] = useState(false);
  const [reason, setReason] = useState('');
  const [wrong, setWrong] = useState<string | undefined>(undefined);
  const wrongReason =
    unsafe && takeBack.error instanceof ApiError
      ? takeBack.error.fields.find(({ path }) => path === 'tagReason')?.message
      : undefined;
  const clear = () => {
    setTyped('');
    setCondition('');
    setUnsafe(false);
    setReason('');
    field.current?.focus();
  };
  const scan = () => {
    if (typed.trim() === '') return;
    const tool = readTool(typed, crib.tools);
    if (!tool) {
      setWrong(toolProblem(typed));
      return;
    }
    if (!crib.outOf.has(tool.id)) {
      setWrong(`${tool.number} ${tool.name} is in the crib by our list. Look at the number again.`);
      return;
    }
    setWrong(undefined);
    // What was typed stays until the tool is back: a refusal or a broken network loses nothing.
    takeBack.take(tool, { condition, tagReason: unsafe ? reason : null, onBack: clear });
  };
  return (
    <section aria-label="Take back a tool" className="take-back">
      <ScanField
        ref={field}
        label="scan the tool that comes back"
        capitals
        enter="go"
        value={typed}
        error={wrong}
        hint="Its number; then Enter, and it is back."
        onChange={setTyped}
        onScan={scan}
      />
      <Field
        label="condition"
        optional
        size="phone"
        autoComplete="off"
        value={condition}
        onChange={(event) => setCondition(event.target.value)}
      />
      <div>
        <CheckField checked={unsafe} onChange={(event) => setUnsafe(event.target.checked)}>
          It is unsafe: tag it out of use
        </CheckField>
        {unsafe && (
          <Field
            label="what is wrong with it"
            size="phone"
            autoComplete="off"
            value={reason}
            error={wrongReason}
            onChange={(event) => setReason(event.target.value)}
          />
        )}
      </div>
      <Action size="phone" look="main" busy={takeBack.busy} onClick={scan}>
        Back
      </Action>
      {wrongReason === undefined && <TakenBack takeBack={takeBack} />}
    </section>
  );
}
