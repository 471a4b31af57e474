import { useState } from 'react';
import type { StepRecord } from '../../../shared/contracts/live';
import { ApiError, NetworkError } from '../../lib/api';
import { useMessages } from '../../lib/messages';
import { commandStep, type QueuedCommand } from '../../lib/write-queue';
import type { BenchNames } from './names';

/** What the last command came to, to be told once. */
export type Outcome =
  | { kind: 'done'; title: string }
  | { kind: 'taken'; title: string; text: string; stepId: string }
  | { kind: 'refused'; title: string; text: string; stepId: string };

export interface BenchCommand {
  run: (step: StepRecord, command: QueuedCommand) => void;
  busyWith: (stepId: string) => boolean;
  outcome: Outcome | null;
  clear: () => void;
}

/** The commands of My bench: sent or queued, and what came of them in words. */
export function useBenchCommand(installationId: string, personId: string, names: BenchNames): BenchCommand {
  const messages = useMessages();
  const [busy, setBusy] = useState<ReadonlySet<string>>(new Set());
  const [outcome, setOutcome] = useState<Outcome | null>(null);
  const mark = (stepId: string, on: boolean) =>
    setBusy((now) => {
      const next = new Set(now);
      if (on) next.add(stepId);
      else next.delete(stepId);
      return next;
    });
  const run = async (step: StepRecord, command: QueuedCommand) => {
    if (busy.has(step.id)) return;
    mark(step.id, true);
    setOutcome(null);
    try {
      const result = await commandStep({ personId, installationId, stepId: step.id, command });
      if (result === 'done') setOutcome(doneWords(step, command, names, messages.bench));
    } catch (error) {
      setOutcome(refusedWords(error, step, names, messages));
    } finally {
      mark(step.id, false);
    }
  };
  return {
    run: (step, command) => void run(step, command),
    busyWith: (stepId) => busy.has(stepId),
    outcome,
    clear: () => setOutcome(null),
  };
}

type BenchWords = ReturnType<typeof useMessages>['bench'];

function doneWords(
  step: StepRecord,
  command: QueuedCommand,
  names: BenchNames,
  words: BenchWords,
): Outcome | null {
  const code = names.codeOf(step);
  switch (command) {
    case 'claim':
      return { kind: 'done', title: words.took(code, step.name, names.stationOf(step)) };
    case 'give-back':
      return { kind: 'done', title: words.gaveBack(code, step.name) };
    case 'finish':
      if (step.clocks) return { kind: 'done', title: words.finishedNow.dries(code) };
      return {
        kind: 'done',
        title: step.needsCheck ? words.finishedNow.toCheck(code) : words.finishedNow.passed(code),
      };
    case 'start':
      return null;
  }
}

/** A refused command in words; a lost race names who was first. */
export function refusedWords(
  error: unknown,
  step: StepRecord,
  names: BenchNames,
  { bench, common, refusals }: ReturnType<typeof useMessages>,
): Outcome {
  const what = names.whatOf(step);
  if (!(error instanceof ApiError)) {
    const title = error instanceof NetworkError ? common.link.broken : common.failed;
    return { kind: 'refused', title, text: common.failed, stepId: step.id };
  }
  const text = names.refusal({ code: error.code, details: error.details }, step);
  if (error.code !== 'STEP_CREW_FULL')
    return { kind: 'refused', title: refusals.titles.notYet(what), text, stepId: step.id };
  const crew = Array.isArray(error.details.crew)
    ? error.details.crew.map((id) => names.personName(String(id)))
    : [];
  return { kind: 'taken', title: bench.lost.title(crew.at(-1) ?? common.someone), text, stepId: step.id };
}
