import { useMutation, useQuery } from '@tanstack/react-query';
import { useRef, useState, type RefObject } from 'react';
import type { Membership, SessionView } from '../../../shared/contracts/live';
import type { CodeView, JoinInput } from '../../../shared/contracts/people';
import type { AgeBand } from '../../../shared/safety';
import { Action } from '../../components/ui/action';
import { OptionStruts } from '../../components/ui/choices';
import { CodeField } from '../../components/ui/code-field';
import { Field } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { ApiError, get, send } from '../../lib/api';
import { useMessages } from '../../lib/messages';
import { useChangeSession } from '../../lib/session';

const CODE_LENGTH = 6;
const BANDS: readonly AgeBand[] = ['18+', '16-17', '13-15', '9-12', 'under-9'];

/** First name, initial, age: in, without a password. */
export function JoinForm({
  initialCode,
  onJoined,
}: {
  initialCode: string;
  onJoined: (place: Membership) => void;
}) {
  const { door, common } = useMessages();
  const form = useRef<HTMLFormElement>(null);
  const changeSession = useChangeSession();
  const [code, setCode] = useState(initialCode.toUpperCase().slice(0, CODE_LENGTH));
  const [firstName, setFirstName] = useState('');
  const [initial, setInitial] = useState('');
  const [ageBand, setAgeBand] = useState<AgeBand | null>(null);
  const [adultName, setAdultName] = useState('');
  const [email, setEmail] = useState('');
  const look = useLookUp(code);
  const join = useMutation({
    mutationFn: () => {
      const minor = ageBand !== null && ageBand !== '18+';
      const body: Omit<JoinInput, 'ageBand'> & { ageBand: AgeBand | undefined } = {
        code,
        firstName,
        initial,
        ageBand: ageBand ?? undefined,
        email,
        ...(minor ? { adultName } : {}),
      };
      return send<SessionView>('POST', '/join', body);
    },
    onSuccess: async (view) => {
      await changeSession(view);
      const { principal } = view;
      const place = principal?.kind === 'person' ? principal.installations[0] : undefined;
      if (place) onJoined(place);
    },
    onError: () => focusFirstWrong(form),
  });
  const refusal = join.error instanceof ApiError ? join.error : null;
  const problem = (path: string) => refusal?.fields.find((field) => field.path === path)?.message;
  const codeError = problem('code') ?? codeProblem(refusal ?? look.error, door, look.data?.name);
  return (
    <form
      ref={form}
      className="grid gap-6"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        if (!join.isPending) join.mutate();
      }}
    >
      <div>
        <CodeField
          label={door.code}
          value={code}
          onChange={setCode}
          length={CODE_LENGTH}
          error={codeError}
          hint={code.length < CODE_LENGTH ? door.codeHint : undefined}
        />
        {look.data && !codeError && (
          <p className="mt-2" role="status">
            {door.today(look.data.name, look.data.onSite)}
          </p>
        )}
      </div>
      <div className="grid grid-cols-[1fr_6rem] gap-5">
        <Field
          label={door.firstName}
          size="phone"
          autoComplete="given-name"
          value={firstName}
          onChange={(event) => setFirstName(event.target.value)}
          error={problem('firstName')}
        />
        <Field
          label={door.initial}
          size="phone"
          maxLength={1}
          autoComplete="off"
          value={initial}
          onChange={(event) => setInitial(event.target.value.toUpperCase())}
          error={problem('initial')}
        />
      </div>
      <OptionStruts<AgeBand>
        legend={door.ageBand}
        hint={door.ageWhy}
        columns={2}
        value={ageBand}
        onChange={setAgeBand}
        error={problem('ageBand')}
        options={BANDS.map((band) => ({ value: band, label: common.ageBands[band] }))}
      />
      {ageBand !== null && ageBand !== '18+' && (
        <Note kind="ask" title={door.adult.title} announce={false}>
          <p>{door.adult.text}</p>
          <Field
            label={door.adult.label}
            size="phone"
            autoComplete="off"
            value={adultName}
            onChange={(event) => setAdultName(event.target.value)}
            error={problem('adultName')}
          />
        </Note>
      )}
      <Field
        label={door.email}
        optional
        size="phone"
        type="email"
        inputMode="email"
        autoComplete="email"
        value={email}
        onChange={(event) => setEmail(event.target.value)}
        error={problem('email')}
      />
      {join.error && !codeError && (refusal?.fields.length ?? 0) === 0 && (
        <Note kind={refusal ? 'refused' : 'no network'} title={refusal ? refusal.message : common.failed} />
      )}
      <Action type="submit" look="main" size="glove" wide busy={join.isPending}>
        {door.comeIn}
      </Action>
      <p className="text-pencil">{door.noPassword}</p>
    </form>
  );
}

/** What the code opens, asked as soon as it is whole. */
function useLookUp(code: string) {
  return useQuery({
    queryKey: ['join', code],
    queryFn: () => get<CodeView>(`/join/${encodeURIComponent(code)}`),
    enabled: code.length === CODE_LENGTH,
    staleTime: 60_000,
  });
}

/** What is wrong with the code, in words for its field. */
function codeProblem(
  error: unknown,
  door: ReturnType<typeof useMessages>['door'],
  name = '',
): string | undefined {
  if (!(error instanceof ApiError)) return undefined;
  switch (error.code) {
    case 'JOIN_CODE_UNKNOWN':
      return door.codeUnknown;
    case 'TOO_MANY_FAILURES':
      return door.tooMany(Math.max(1, Math.ceil(Number(error.details.retryAfterSeconds ?? 60) / 60)));
    case 'INSTALLATION_CLOSED':
      return door.closed(typeof error.details.name === 'string' ? error.details.name : name);
    case 'INSTALLATION_NOT_PUBLISHED':
      return error.message;
    default:
      return undefined;
  }
}

/** After the errors are on the page, the first wrong field has the focus. */
function focusFirstWrong(form: RefObject<HTMLFormElement | null>): void {
  requestAnimationFrame(() => {
    form.current?.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
  });
}
