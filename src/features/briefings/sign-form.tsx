import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { BriefingTextView } from '../../../shared/contracts/safety';
import { Action } from '../../components/ui/action';
import { Field } from '../../components/ui/field';
import { DimensionHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { ApiError, send } from '../../lib/api';
import { useMessages } from '../../lib/messages';
import { SignaturePad } from './signature-pad';

interface Props {
  installationId: string;
  view: BriefingTextView;
  name: string;
  leads: readonly string[];
}

/** Sign by drawing or by typing one's full name. */
export function SignForm({ installationId, view, name, leads }: Props) {
  const { briefing: words, common } = useMessages();
  const [typing, setTyping] = useState(false);
  const [typed, setTyped] = useState('');
  const [path, setPath] = useState('');
  const [missing, setMissing] = useState(false);
  const value = typing ? typed.trim() : path;
  const sign = useMutation({
    mutationFn: () =>
      send('POST', `/installations/${installationId}/briefings/${view.key}/sign`, {
        version: view.version,
        signature: { kind: typing ? 'typed' : 'drawn', value },
      }),
  });
  const refusal = sign.error instanceof ApiError ? sign.error : null;
  const error = refusal?.fields[0]?.message ?? (missing && value === '' ? words.signatureMissing : undefined);
  return (
    <form
      className="grid gap-5"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        setMissing(true);
        if (value !== '' && !sign.isPending) sign.mutate();
      }}
    >
      <DimensionHead>{words.sign}</DimensionHead>
      <p>{words.declaration(view.version, view.body.questions.length, name)}</p>
      {typing ? (
        <Field
          label={words.fullName}
          size="phone"
          autoComplete="name"
          value={typed}
          error={error}
          onChange={(event) => setTyped(event.target.value)}
        />
      ) : (
        <SignaturePad
          label={words.draw}
          clearWords={words.clear}
          path={path}
          onChange={setPath}
          error={error}
        />
      )}
      <Action look="words" size="phone" onClick={() => setTyping(!typing)}>
        {typing ? words.drawInstead : words.typeInstead}
      </Action>
      {sign.error && !error && <Note kind="refused" title={refusal?.message ?? common.failed} />}
      <Action
        type="submit"
        look="main"
        size="glove"
        wide
        busy={sign.isPending}
        detail={words.thenCountersign(leads)}
      >
        {words.sign}
      </Action>
    </form>
  );
}
