import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { StateGlyph } from '../../components/ui/strut-glyph';
import { formatTime } from '../../lib/formats';
import { link } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { serverTimeOf } from '../../lib/server-clock';
import { useStore } from '../../lib/store';
import { dropQueued, outcomes, queue, readOutcome, type QueuedWrite } from '../../lib/write-queue';
import type { BenchNames } from './names';
import { refusedWords, type BenchCommand } from './use-bench-command';

interface Props {
  installationId: string;
  personId: string;
  names: BenchNames;
}

/** What the last command came to, and what became of changes that had waited. */
export function Told({ command, names, installationId, personId }: Props & { command: BenchCommand }) {
  const messages = useMessages();
  const all = useStore(outcomes);
  const mine = all.filter(
    ({ write }) => write.installationId === installationId && write.personId === personId,
  );
  const { outcome } = command;
  return (
    <>
      {outcome && (
        <Note
          kind={outcome.kind === 'done' ? 'done' : outcome.kind}
          title={outcome.title}
          actions={
            <Action look="words" onClick={command.clear}>
              {messages.common.close}
            </Action>
          }
        >
          {outcome.kind !== 'done' && <p>{outcome.text}</p>}
        </Note>
      )}
      {mine
        .filter(({ result }) => result !== 'done')
        .map(({ write, result, error }) => {
          const step = names.stepById(write.stepId);
          const said = step && error ? refusedWords(error, step, names, messages) : null;
          return (
            <Note
              key={write.key}
              kind={said?.kind === 'taken' ? 'taken' : 'refused'}
              title={said?.title ?? messages.refusals.titles.notYet(names.whatOfId(write.stepId))}
              actions={
                <Action look="words" onClick={() => readOutcome(write.key)}>
                  {messages.common.close}
                </Action>
              }
            >
              <p>
                {result === 'expired'
                  ? messages.refusals.OFFLINE_CLAIM_EXPIRED
                  : said && said.kind !== 'done'
                    ? said.text
                    : messages.common.failed}
              </p>
            </Note>
          );
        })}
    </>
  );
}

/** Changes that wait on this phone; nothing of them is mine yet. */
export function Waiting({ installationId, personId, names }: Props) {
  const { bench: words } = useMessages();
  const waiting = useStore(queue).filter(
    (write) => write.installationId === installationId && write.personId === personId,
  );
  const { state } = useStore(link);
  if (waiting.length === 0) return null;
  return (
    <section aria-labelledby="bench-waiting">
      <DimensionHead id="bench-waiting" right={waiting.length}>
        {words.offline.waiting}
      </DimensionHead>
      {state === 'broken' && <p className="mt-3">{words.offline.waits(waiting.length)}</p>}
      <ul>
        {waiting.map((write) => (
          <WaitingRow key={write.key} write={write} names={names} />
        ))}
      </ul>
    </section>
  );
}

function WaitingRow({ write, names }: { write: QueuedWrite; names: BenchNames }) {
  const { bench: words } = useMessages();
  const step = names.stepById(write.stepId);
  if (!step) return null;
  const commandWords = {
    claim: words.take,
    'give-back': words.giveBack,
    start: words.start,
    finish: words.finished,
  };
  const at = formatTime(serverTimeOf(write.at), names.zone);
  return (
    <li className="border-b border-rule py-4">
      <h3>{words.offline.waitingStep(commandWords[write.command], names.codeOf(step), step.name, at)}</h3>
      <p className="flex items-center gap-2 text-pencil">
        <StateGlyph state={step.held ? 'held' : step.state} /> {words.offline.notYours}
      </p>
      <Action wide size="phone" onClick={() => dropQueued(write.key)}>
        {write.command === 'finish' ? words.offline.takeBack : words.offline.drop}
      </Action>
    </li>
  );
}
