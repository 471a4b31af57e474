import { useMutation } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import type { AnswerResult, BriefingTextView } from '../../../shared/contracts/safety';
import { Action } from '../../components/ui/action';
import { OptionStruts } from '../../components/ui/choices';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { ApiError, send } from '../../lib/api';
import { useMessages } from '../../lib/messages';

interface Props {
  installationId: string;
  view: BriefingTextView;
  talkNeeded: boolean;
  leads: readonly string[];
}

/** The question sheet: every question, handed in at once; what was wrong is told with its reason. */
export function QuestionSheet({ installationId, view, talkNeeded, leads }: Props) {
  const { briefing: words, common } = useMessages();
  const form = useRef<HTMLFormElement>(null);
  const [answers, setAnswers] = useState<Record<string, string>>({});
  const [tried, setTried] = useState(false);
  const { questions } = view.body;
  const hand = useMutation({
    mutationFn: () =>
      send<AnswerResult>('POST', `/installations/${installationId}/briefings/${view.key}/answers`, {
        version: view.version,
        answers,
      }),
    onSuccess: () => focusFirstWrong(),
  });
  const focusFirstWrong = () =>
    requestAnimationFrame(() => form.current?.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus());
  const wrong = new Map(
    hand.data?.results.filter(({ right }) => !right).map(({ questionId, why }) => [questionId, why]),
  );
  if (talkNeeded || hand.data?.talkNeeded) {
    return (
      <Note kind="ask" title={words.talk.title}>
        <p>{words.talk.text(leads)}</p>
      </Note>
    );
  }
  const unanswered = questions.filter(({ id }) => answers[id] === undefined);
  return (
    <form
      ref={form}
      className="grid gap-6"
      noValidate
      aria-label={words.questions}
      onSubmit={(event) => {
        event.preventDefault();
        setTried(true);
        if (unanswered.length > 0) focusFirstWrong();
        else if (!hand.isPending) hand.mutate();
      }}
    >
      <DimensionHead
        right={hand.data ? words.rightOf(questions.length - wrong.size, questions.length) : undefined}
      >
        {words.questions}
      </DimensionHead>
      {questions.map((question, index) => (
        <OptionStruts
          key={question.id}
          question
          legend={`${index + 1}. ${question.text}`}
          value={answers[question.id] ?? null}
          onChange={(value) => setAnswers((now) => ({ ...now, [question.id]: value }))}
          error={
            wrong.get(question.id) ??
            (tried && answers[question.id] === undefined ? words.answerAll : undefined)
          }
          options={question.options.map((option) => ({ value: option.id, label: option.text }))}
        />
      ))}
      {hand.data && wrong.size > 0 && <Note kind="refused" title={words.missed(wrong.size)} />}
      {hand.error && (
        <Note kind="refused" title={hand.error instanceof ApiError ? hand.error.message : common.failed} />
      )}
      <Action type="submit" look="main" size="glove" wide busy={hand.isPending}>
        {words.hand}
      </Action>
    </form>
  );
}
