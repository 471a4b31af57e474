import type { Action } from '../../../shared/accounts';
import {
  claimSchema,
  endDryingSchema,
  finishSchema,
  holdSchema,
  noBodySchema,
  offerSchema,
  recordSchema,
  releaseSchema,
  reworkSchema,
  stillWetSchema,
} from '../../../shared/contracts/travellers';
import type { Command } from '../../../shared/travellers';
import type { z } from 'zod';
import { notFound } from '../../http/app-error';
import { route, type AnyRoute } from '../../http/route';
import { commandStep } from './steps.service';

/** A command's route: its name, who may, its body, and the command it makes of it at the server's time. */
function commandRoute<B>(
  name: string,
  action: Action,
  body: z.ZodType<B>,
  toCommand: (body: B, now: number) => Command,
): AnyRoute {
  return route<B>({
    method: 'post',
    path: `/installations/:installationId/steps/:stepId/${name}`,
    action,
    body,
    handle: ({ write, actor, installationId, params, body: input }) => {
      const { personId } = actor;
      if (personId === null) throw notFound();
      return write((scope) =>
        commandStep(scope, installationId, params.stepId ?? '', personId, toCommand(input, scope.now)),
      );
    },
  });
}

/** When it was done, by how long it lay in the phone's queue; a phone's wall clock is not asked. */
const happenedAt = (queuedMs: number | undefined, now: number) =>
  queuedMs === undefined ? undefined : now - queuedMs;

/** Every command of the board. */
export const stepsRoutes = (): AnyRoute[] => [
  commandRoute('claim', 'step.claim', claimSchema, ({ queuedMs }, now) => ({
    type: 'claim',
    happenedAt: happenedAt(queuedMs, now),
  })),
  commandRoute('give-back', 'step.give-back', noBodySchema, () => ({ type: 'give-back' })),
  commandRoute('offer', 'step.hand-over', offerSchema, ({ to }) => ({ type: 'offer', to })),
  commandRoute('accept', 'step.hand-over', noBodySchema, () => ({ type: 'accept' })),
  commandRoute('withdraw', 'step.hand-over', noBodySchema, () => ({ type: 'withdraw' })),
  commandRoute('start', 'step.start', noBodySchema, () => ({ type: 'start' })),
  commandRoute('finish', 'step.finish', finishSchema, ({ queuedMs }, now) => ({
    type: 'finish',
    happenedAt: happenedAt(queuedMs, now),
  })),
  commandRoute('record', 'step.record', recordSchema, ({ crew, minutesAgo }, now) => ({
    type: 'record',
    crew,
    happenedAt: now - minutesAgo * 60_000,
  })),
  commandRoute('still-wet', 'step.still-wet', stillWetSchema, ({ minutes }) => ({
    type: 'still-wet',
    seconds: minutes * 60,
  })),
  commandRoute('end-drying', 'step.end-drying', endDryingSchema, ({ reason }) => ({
    type: 'end-drying',
    reason,
  })),
  commandRoute('pass', 'step.check', noBodySchema, () => ({ type: 'pass' })),
  commandRoute('rework', 'step.rework', reworkSchema, ({ reason, targetId }) => ({
    type: 'rework',
    reason,
    targetId,
  })),
  commandRoute('hold', 'step.hold', holdSchema, ({ reason }) => ({ type: 'hold', reason })),
  commandRoute('release', 'step.release', releaseSchema, ({ note }) => ({ type: 'release', note })),
];
