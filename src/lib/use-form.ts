import { useRef, useState, type SyntheticEvent } from 'react';
import { flushSync } from 'react-dom';
import type { FieldProblem } from '../../shared/contracts/errors';
import { ApiError } from './api';
import { useSend, type Wish } from './use-send';

/** What a form was told: by its own look at the fields (`own`), or by the server. */
interface Told {
  error: unknown;
  fields: readonly FieldProblem[];
  own: boolean;
}

const NOTHING: Told = { error: null, fields: [], own: false };

export interface Form {
  onSubmit: (event: SyntheticEvent<HTMLFormElement>) => void;
  /** The words for a field, by its dotted path; undefined when it is right. */
  problem: (path: string) => string | undefined;
  busy: boolean;
  /** A refusal that belongs to no field. */
  error: unknown;
  /** Problems of fields that this form does not show. */
  unplaced: readonly string[];
  /** Forget what was told. */
  clear: () => void;
}

/**
 * A form: every problem at once beside its field, the focus on the first wrong one, nothing sent twice, nothing typed lost.
 * @param request what to send, or the problems that keep it from being sent
 *   Pure: after a refusal it is asked again while somebody types, so that what was put right stops being marked.
 * @param onDone what to do with the answer
 * @param onProblems called before problems are shown, to open what hides their fields
 */
export function useForm<R = unknown>({
  request,
  onDone,
  onProblems,
}: {
  request: () => Wish | { problems: readonly FieldProblem[] };
  onDone?: (reply: R) => unknown;
  onProblems?: (fields: readonly FieldProblem[]) => void;
}): Form {
  const sending = useRef(false);
  const [told, setTold] = useState<Told>(NOTHING);
  const [unplaced, setUnplaced] = useState<readonly string[]>([]);
  const change = useSend<R>(onDone);

  const tell = (next: Told, form: HTMLFormElement) => {
    // The words have to stand on the page before the focus can go to the field they belong to.
    flushSync(() => {
      onProblems?.(next.fields);
      setTold(next);
      setUnplaced([]);
    });
    const shown = new Set(next.fields.filter(({ message }) => isShown(message)).map(({ path }) => path));
    setUnplaced(next.fields.filter(({ path }) => !shown.has(path)).map(({ message }) => message));
    firstWrong(form)?.focus();
  };

  const submit = async (form: HTMLFormElement) => {
    if (sending.current) return;
    const wish = request();
    if ('problems' in wish) {
      tell({ error: null, fields: wish.problems, own: true }, form);
      return;
    }
    sending.current = true;
    try {
      await change.mutateAsync(wish);
      setTold(NOTHING);
      setUnplaced([]);
    } catch (error) {
      tell({ error, fields: error instanceof ApiError ? error.fields : [], own: false }, form);
    } finally {
      sending.current = false;
    }
  };

  const fields = told.own ? stillWrong(told.fields, request()) : told.fields;
  return {
    onSubmit: (event) => {
      event.preventDefault();
      void submit(event.currentTarget);
    },
    problem: (path) => fields.find((field) => field.path === path)?.message,
    busy: change.isPending,
    error: told.fields.length === 0 ? told.error : null,
    unplaced,
    clear: () => {
      setTold(NOTHING);
      setUnplaced([]);
    },
  };
}

/** Of the problems that were told, those that a new look still finds, in their present words. */
function stillWrong(
  told: readonly FieldProblem[],
  now: Wish | { problems: readonly FieldProblem[] },
): readonly FieldProblem[] {
  if (!('problems' in now)) return [];
  const paths = new Set(told.map(({ path }) => path));
  return now.problems.filter(({ path }) => paths.has(path));
}

const isShown = (words: string): boolean =>
  [...document.querySelectorAll('.field-error')].some((element) => element.textContent.includes(words));

/** The first wrong field of a form, those outside that belong to it included. */
function firstWrong(form: HTMLFormElement): HTMLElement | undefined {
  return [...form.elements].find(
    (element): element is HTMLElement =>
      element instanceof HTMLElement && element.getAttribute('aria-invalid') === 'true',
  );
}
