import { useQuery } from '@tanstack/react-query';
import type { OutboxLetter } from '../../../shared/contracts/accounts';
import { EmptyNote } from '../../components/ui/note';
import { Pending } from '../../components/ui/pending';
import { Refusal } from '../../components/ui/refusal';
import { ApiError, get } from '../../lib/api';

const LINK = /(https?:\/\/[^\s<>"]+)/;

/** The letter's text; its links lead somewhere. */
function LetterText({ text }: { text: string }) {
  return (
    <p className="whitespace-pre-wrap">
      {text.split(LINK).map((part, i) =>
        LINK.test(part) ? (
          <a key={i} href={part} className="underline underline-offset-4">
            {part}
          </a>
        ) : (
          part
        ),
      )}
    </p>
  );
}

const when = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'medium' });

/** Letters this Strutbee wrote and kept for itself, newest first. */
export function OutboxList() {
  const letters = useQuery({
    queryKey: ['outbox'],
    queryFn: () => get<OutboxLetter[]>('/outbox'),
    refetchInterval: 5000,
  });
  if (letters.error instanceof ApiError && letters.error.code === 'NOT_FOUND')
    return (
      <EmptyNote title="Letters are not kept here.">
        This Strutbee sends them by post server. Only a demo keeps them on this page.
      </EmptyNote>
    );
  if (letters.error) return <Refusal error={letters.error} />;
  if (!letters.data) return <Pending />;
  if (letters.data.length === 0)
    return (
      <EmptyNote title="No letters yet.">
        Invite somebody on the screen Accounts, and the letter stands here.
      </EmptyNote>
    );
  const sorted = [...letters.data].sort((a, b) => b.receivedAt - a.receivedAt);
  return (
    <ol className="grid gap-8">
      {sorted.map((letter) => (
        <li key={letter.id}>
          <article
            className="grid max-w-words gap-3 border-t-line border-pencil pt-3"
            aria-label={letter.subject}
          >
            <h2 className="text-t1">{letter.subject}</h2>
            <dl className="grid grid-cols-[auto_1fr] gap-x-4 text-small">
              <dt className="text-pencil">to</dt>
              <dd>{letter.to}</dd>
              <dt className="text-pencil">from</dt>
              <dd>{letter.from}</dd>
              <dt className="text-pencil">written</dt>
              <dd>{when.format(letter.receivedAt)}</dd>
            </dl>
            <LetterText text={letter.text} />
          </article>
        </li>
      ))}
    </ol>
  );
}
