import type { Snapshot, StepRecord } from '../../../shared/contracts/live';
import type { Random } from '../../../shared/kernel/random';
import { chainBehind } from '../../../shared/travellers';
import { DemoRefusal, type DemoClient } from './demo-client';
import { BUILD_DAY, DEMO_NOW, onTheDay } from './demo-scenario';

/** Somebody who works through the demo's morning. */
export interface Worker {
  personId: string;
  client: DemoClient;
  glue: boolean;
  /** May pass checks. */
  checks: boolean;
}

export interface Morning {
  installationId: string;
  workers: Worker[];
  /** Reads the whole state. */
  lead: DemoClient;
  setClock(at: number): void;
  /** Let the server's own clocks of paint run out where they have. */
  endDrying(): Promise<unknown>;
  random: Random;
}

const MINUTE = 60_000;
/** Of the planned time, what people really take: between the first and the second. */
const PACE = [0.8, 1.25] as const;
/** One check in so many sends a step back. */
const REWORK_ONE_IN = 14;
const REASONS = [
  'joint 6 is open',
  'a string of glue still hangs at joint 9',
  'the point is not straight',
  'one strut is 4 mm short',
];

const minuteOf = (time: string) => Number(time.slice(0, 2)) * 60 + Number(time.slice(3));
const isBreak = (minute: number) =>
  BUILD_DAY.breaks.some(({ from, to }) => minute >= minuteOf(from) && minute < minuteOf(to));

/** Plays the day from its start until the demo's clock stands still: claims, starts, finishes, checks, rework. */
export async function playMorning(morning: Morning): Promise<void> {
  const player = new Player(morning);
  const first = minuteOf(BUILD_DAY.start) + 20;
  const last = Math.floor((DEMO_NOW - onTheDay(0, 0)) / MINUTE);
  for (let minute = first; minute <= last; minute += 1) {
    if (isBreak(minute)) continue;
    morning.setClock(onTheDay(0, minute));
    await morning.endDrying();
    await player.minute(onTheDay(0, minute));
  }
}

class Player {
  /** When the crew of a step will be done, ms. */
  private readonly doneAt = new Map<string, number>();

  constructor(private readonly morning: Morning) {}

  async minute(now: number): Promise<void> {
    const { lead, installationId } = this.morning;
    const snapshot = await lead.get<Snapshot>(`/installations/${installationId}/live`);
    // In the order of codes, so that the same morning is played at every fresh start whatever the ids are.
    const codes = new Map(snapshot.records.subAssemblies.map((piece) => [piece.id, piece.code]));
    const key = (step: StepRecord) =>
      `${codes.get(step.subAssemblyId) ?? ''} ${String(step.position).padStart(2, '0')}`;
    const steps = [...snapshot.records.steps].sort((a, b) => key(a).localeCompare(key(b)));
    await this.finishDue(steps, now);
    await this.check(steps, now);
    await this.takeNext(steps, now);
  }

  private async finishDue(steps: readonly StepRecord[], now: number): Promise<void> {
    for (const step of steps) {
      const due = this.doneAt.get(step.id);
      if (step.state !== 'in hand' || step.held || due === undefined || due > now) continue;
      const worker = this.workerOf(step.crew[0]?.personId);
      if (worker) await this.ask(worker, step, 'finish');
      this.doneAt.delete(step.id);
    }
  }

  private async check(steps: readonly StepRecord[], now: number): Promise<void> {
    const { workers, random } = this.morning;
    for (const step of steps) {
      // A checker comes round after some minutes, not at once.
      if (step.state !== 'to check' || now - (step.finishedAt ?? now) < 6 * MINUTE) continue;
      const checker = workers.find((worker) => worker.checks && !step.doers.includes(worker.personId));
      if (!checker) continue;
      if (Math.floor(random() * REWORK_ONE_IN) === 0) {
        const reason = REASONS[Math.floor(random() * REASONS.length)] ?? 'look again';
        await this.ask(checker, step, 'rework', { reason, targetId: step.id });
      } else {
        await this.ask(checker, step, 'pass');
      }
    }
  }

  private async takeNext(steps: readonly StepRecord[], now: number): Promise<void> {
    const { workers } = this.morning;
    const crews = new Map(steps.map((step) => [step.id, new Set(step.crew.map(({ personId }) => personId))]));
    const busy = new Set([...crews.values()].flatMap((crew) => [...crew]));
    for (const worker of workers) {
      if (busy.has(worker.personId)) continue;
      for (const step of this.wishesOf(worker, steps, crews)) {
        if (!(await this.ask(worker, step, 'claim'))) continue;
        const crew = crews.get(step.id);
        crew?.add(worker.personId);
        busy.add(worker.personId);
        if ((crew?.size ?? 0) >= step.crewMin && step.startedAt === null && !this.doneAt.has(step.id))
          await this.start(worker, step, now);
        break;
      }
    }
  }

  private async start(worker: Worker, step: StepRecord, now: number): Promise<void> {
    const { random } = this.morning;
    if (!(await this.ask(worker, step, 'start'))) return;
    const pace = PACE[0] + random() * (PACE[1] - PACE[0]);
    this.doneAt.set(step.id, now + step.plannedSeconds * 1000 * pace);
  }

  /** Open steps for this worker: those that lack hands first, then the longest chain of work behind. */
  private wishesOf(
    worker: Worker,
    steps: readonly StepRecord[],
    crews: ReadonlyMap<string, ReadonlySet<string>>,
  ): StepRecord[] {
    const { workers } = this.morning;
    const size = (step: StepRecord) => crews.get(step.id)?.size ?? 0;
    const gluing = steps.filter(
      (step) => step.state === 'in hand' && step.hazards.includes('hot-glue'),
    ).length;
    const open = steps.filter((step) => {
      const hot = step.hazards.includes('hot-glue');
      // Whoever has a gun glues; nobody else does.
      if (step.held || hot !== worker.glue || (hot && gluing >= 8)) return false;
      return (
        step.state === 'ready' ||
        step.state === 'rework' ||
        (step.state === 'in hand' && size(step) < step.crewMin)
      );
    });
    // Half of the people begin the longest chain, the other half finish what is nearly done: so the hall looks at two.
    const finisher = workers.indexOf(worker) % 2 === 1;
    const weight = (step: StepRecord) =>
      (step.state === 'in hand' ? 1e9 : 0) +
      (finisher
        ? step.position
        : chainBehind(
            steps.filter((other) => other.subAssemblyId === step.subAssemblyId),
            step,
          ).seconds);
    return open.sort((a, b) => weight(b) - weight(a)).slice(0, 3);
  }

  private workerOf(personId: string | undefined): Worker | undefined {
    return this.morning.workers.find((worker) => worker.personId === personId);
  }

  /** Ask as that person; a refusal is part of the day. */
  private async ask(worker: Worker, step: StepRecord, command: string, body: object = {}): Promise<boolean> {
    try {
      await worker.client.post(
        `/installations/${this.morning.installationId}/steps/${step.id}/${command}`,
        body,
      );
      return true;
    } catch (error) {
      if (error instanceof DemoRefusal) return false;
      throw error;
    }
  }
}
