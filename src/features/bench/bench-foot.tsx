import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { DEFAULT_AGE_RULES } from '../../../shared/safety/age-table';
import { tightenAgeRules, whatIMayDo } from '../../../shared/safety/age-rules';
import type { AgeBand } from '../../../shared/safety';
import { Action } from '../../components/ui/action';
import { Dialog } from '../../components/ui/dialog';
import { DimensionHead } from '../../components/ui/heads';
import { send } from '../../lib/api';
import { useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import { SESSION_KEY } from '../../lib/session-key';

/** What somebody under 18 may do, permitted things first. */
export function WhatIMayDo({ installationId, personId }: { installationId: string; personId: string }) {
  const { bench: words, common } = useMessages();
  const band: AgeBand | undefined = useLiveMap(installationId, 'people').get(personId)?.details?.ageBand;
  const changes = useLiveMap(installationId, 'installation').get(installationId)?.settings.ageChanges ?? [];
  if (!band || band === '18+') return null;
  const table = tightenAgeRules(DEFAULT_AGE_RULES, changes);
  const list = whatIMayDo(table.ok ? table.value : DEFAULT_AGE_RULES, band);
  return (
    <section aria-labelledby="bench-may">
      <DimensionHead id="bench-may">{words.youMay}</DimensionHead>
      <ul className="mt-3 grid gap-1">
        {list.map((permission) => (
          <li
            key={permission.activity}
            className={permission.verdict === 'refused' ? 'text-pencil' : undefined}
          >
            {permission.verdict === 'refused'
              ? words.mayNot(common.activities[permission.activity])
              : common.activities[permission.activity]}
          </li>
        ))}
      </ul>
    </section>
  );
}

/** Going home: places are given back, the head count is right. */
export function GoHome({ installationId }: { installationId: string }) {
  const { bench: words, common } = useMessages();
  const client = useQueryClient();
  const [open, setOpen] = useState(false);
  const leave = useMutation({
    mutationFn: () => send('POST', `/installations/${installationId}/leave`),
    onSuccess: async () => {
      setOpen(false);
      await client.invalidateQueries({ queryKey: SESSION_KEY });
    },
  });
  return (
    <>
      <Action look="words" size="phone" onClick={() => setOpen(true)}>
        {words.goHome.action}
      </Action>
      <Dialog
        open={open}
        title={words.goHome.title}
        onClose={() => setOpen(false)}
        actions={
          <>
            <Action size="phone" look="main" busy={leave.isPending} onClick={() => leave.mutate()}>
              {words.goHome.action}
            </Action>
            <Action look="words" onClick={() => setOpen(false)}>
              {common.cancel}
            </Action>
          </>
        }
      >
        <p>{words.goHome.text}</p>
        {leave.error && <p role="alert">{common.failed}</p>}
      </Dialog>
    </>
  );
}
