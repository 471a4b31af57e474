import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Snapshot } from '../../shared/contracts/live';
import type { BriefingTextView, ProposedVersionView, VersionOutcome } from '../../shared/contracts/safety';
import { HOT_GLUE_BODY } from '../../shared/safety';
import { missingSignOffs } from '../../server/modules/safety';
import { inScope, signedInClient } from '../support/fixtures';
import {
  answersWith,
  holdsStep,
  logged,
  openHall,
  signs,
  signsOff,
  stored,
  type Hall,
} from '../support/fixtures-safety';
import type { TestClient } from '../support/test-server';

const HOUR = 3600_000;
let hall: Hall;
let briefing: string;

beforeEach(async () => {
  hall = await openHall();
  briefing = `${hall.base}/briefings/hot-glue`;
});
afterEach(() => hall.server.close());

const missing = async (personId: string) => {
  const now = hall.server.clock.now();
  const all = await inScope(hall.server.app, hall.installationId, ({ manager }) =>
    missingSignOffs(manager, hall.installationId, personId, now),
  );
  return all['hot-glue'];
};
const body = { ...HOT_GLUE_BODY, closing: 'The venue lets nobody glue in the foyer.' };
const change = (client: TestClient, effectiveFrom: number | null, more: object = {}) =>
  client.post<VersionOutcome>(`${briefing}/versions`, {
    kind: 'change',
    body,
    whatChanged: 'No gluing in the foyer.',
    effectiveFrom,
    basedOn: 1,
    ...more,
  });
const correct = (client: TestClient, more: object = {}) =>
  client.post<VersionOutcome>(`${briefing}/versions`, {
    kind: 'correction',
    body,
    whatChanged: 'A spelling put right.',
    effectiveFrom: null,
    basedOn: 1,
    ...more,
  });
const proposals = async () => (await hall.second.get<ProposedVersionView[]>(`${briefing}/proposals`)).data;

describe('a change', () => {
  it('proposeVersion > a change from 12:00 > sign-offs hold until then, not from then on; the new version counts ahead', async () => {
    await signsOff(hall, hall.ines);
    const from = hall.server.clock.now() + 2 * HOUR;
    const reply = await change(hall.lead, from);
    expect(reply.data).toEqual({ version: 2, status: 'published', workInHand: [] });
    hall.server.clock.set(from - 1);
    expect(await missing(hall.inesId)).toBeUndefined();
    hall.server.clock.set(from);
    expect(await missing(hall.inesId)).toBe('VOIDED_BY_CHANGE');
    const text = (await hall.ines.get<BriefingTextView>(briefing)).data;
    expect(text).toMatchObject({ version: 2, kind: 'change', whatChanged: 'No gluing in the foyer.' });
    await signs(hall, hall.ines, 2);
    expect(await missing(hall.inesId)).toBe('NOT_COUNTERSIGNED');
  });

  it('answerSheet > the change is not in force yet > the old version still counts, the new one may be signed ahead', async () => {
    const from = hall.server.clock.now() + 2 * HOUR;
    await signsOff(hall, hall.ines);
    await change(hall.lead, from);
    const old = await hall.organiser.post(`${briefing}/answers`, { version: 1, answers: answersWith() });
    expect(old.status).toBe(200);
    const signOffId = await signs(hall, hall.ines, 2);
    await hall.lead.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
    hall.server.clock.set(from + 1);
    expect(await missing(hall.inesId)).toBeUndefined();
  });

  it('answerSheet > a page with the old version > BRIEFING_VERSION_OLD names the current one', async () => {
    await change(hall.lead, hall.server.clock.now());
    const reply = await hall.ines.post(`${briefing}/answers`, { version: 1, answers: answersWith() });
    expect(reply.error).toMatchObject({ code: 'BRIEFING_VERSION_OLD', details: { version: 1, current: 2 } });
  });

  it('countersignSignOff > a change has ended what was signed > BRIEFING_VERSION_OLD', async () => {
    const signOffId = await signs(hall, hall.ines);
    await change(hall.lead, hall.server.clock.now());
    const reply = await hall.lead.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
    expect(reply.error?.code).toBe('BRIEFING_VERSION_OLD');
  });

  it('proposeVersion > work in hand under an ended sign-off > listed for the lead and logged, not stopped', async () => {
    await signsOff(hall, hall.ines);
    const stepId = await holdsStep(hall, hall.inesId);
    await holdsStep(hall, hall.inesId, []);
    await holdsStep(hall, hall.inesId, ['cutting']);
    const reply = await change(hall.lead, hall.server.clock.now());
    expect(reply.data.workInHand).toEqual([{ stepId, personId: hall.inesId, hazards: ['hot-glue'] }]);
    expect(await logged(hall, 'briefing.changed')).toMatchObject([
      { actor: `person:${hall.leadId}`, subject: { version: 2, stepsInHand: [stepId] } },
    ]);
    const steps = await stored<{ state: string }>(hall, 'SELECT state FROM step WHERE installation_id = ?');
    expect(steps.map((step) => step.state)).toEqual(['in hand', 'in hand', 'in hand']);
  });

  it('revokeSignOff > the person has a glue step in hand > listed for the lead', async () => {
    const signOffId = await signsOff(hall, hall.ines);
    const stepId = await holdsStep(hall, hall.inesId);
    hall.server.clock.advance(1000);
    const reply = await hall.lead.post(`${hall.base}/sign-offs/${signOffId}/revoke`, { reason: 'careless' });
    expect(reply.data).toMatchObject({ workInHand: [{ stepId, personId: hall.inesId }] });
  });

  it.each([
    ['no time', { effectiveFrom: null }, 'effectiveFrom'],
    ['a time past', { effectiveFrom: 1 }, 'effectiveFrom'],
    ['no words on what changed', { whatChanged: '  ' }, 'whatChanged'],
    ['a panel with the wrong signal word', { body: badPanel() }, 'body.panels.0.signalWord'],
  ])('proposeVersion > %s > refused beside the field, nothing published', async (_what, more, path) => {
    const reply = await change(hall.lead, hall.server.clock.now(), more);
    expect(reply.status).toBe(400);
    expect(reply.error?.fields?.map((field) => field.path)).toContain(path);
    expect((await hall.ines.get<BriefingTextView>(briefing)).data.version).toBe(1);
  });

  it('proposeVersion > written on an older version > STALE_PAGE', async () => {
    const now = hall.server.clock.now();
    await change(hall.lead, now);
    const reply = await change(hall.second, now);
    expect(reply.error).toMatchObject({ code: 'STALE_PAGE', details: { basedOn: 1, newest: 2 } });
  });

  it('live record > after a change > people see both versions, the projector no briefing', async () => {
    await change(hall.lead, hall.server.clock.now());
    const { data } = await hall.ines.get<Snapshot>(`${hall.base}/live`);
    expect(data.records.briefings).toMatchObject([
      {
        key: 'hot-glue',
        versions: [
          { version: 1, kind: 'first', whatChanged: null },
          { version: 2, kind: 'change', whatChanged: 'No gluing in the foyer.' },
        ],
      },
    ]);
    await stored(
      hall,
      `INSERT INTO display_token (installation_id, id, label, token_hash, created_at) VALUES (?, 'beamer', 'hall', 'x', 0)`,
    );
    const projector = await signedInClient(hall.server, 'display:beamer');
    expect((await projector.get<Snapshot>(`${hall.base}/live`)).data.records.briefings).toEqual([]);
    expect((await projector.get(briefing)).error?.code).toBe('NOT_ALLOWED');
  });
});

function badPanel() {
  const [first, ...rest] = HOT_GLUE_BODY.panels;
  return { ...HOT_GLUE_BODY, panels: [{ ...first, signalWord: 'CAUTION' }, ...rest] };
}

describe('a correction', () => {
  it('secondCorrection > by a second safety lead > published, sign-offs stand', async () => {
    await signsOff(hall, hall.ines);
    expect((await correct(hall.lead)).data).toEqual({ version: 2, status: 'proposed', workInHand: [] });
    expect((await hall.ines.get<BriefingTextView>(briefing)).data.version).toBe(1);
    expect((await hall.ines.get<Snapshot>(`${hall.base}/live`)).text).not.toContain('A spelling put right');
    const [proposal] = await proposals();
    expect(proposal).toMatchObject({
      version: 2,
      proposedBy: hall.leadId,
      whatChanged: 'A spelling put right.',
    });
    hall.server.clock.advance(HOUR);
    const path = `${briefing}/proposals/2/second`;
    const second = await hall.second.post(path, { proposedAt: proposal?.at });
    expect(second.data).toMatchObject({ version: 2, status: 'published' });
    expect(await missing(hall.inesId)).toBeUndefined();
    expect((await hall.ines.get<BriefingTextView>(briefing)).data).toMatchObject({
      version: 2,
      kind: 'correction',
    });
    expect(await proposals()).toEqual([]);
    expect(await logged(hall, 'briefing.corrected')).toMatchObject([
      { actor: `person:${hall.secondId}`, subject: { proposedBy: hall.leadId } },
    ]);
  });

  it('secondCorrection > by whoever proposed it > SECOND_LEAD_NEEDED, not published', async () => {
    await correct(hall.lead);
    const [proposal] = await proposals();
    const reply = await hall.lead.post(`${briefing}/proposals/2/second`, { proposedAt: proposal?.at });
    expect(reply.error?.code).toBe('SECOND_LEAD_NEEDED');
    const organiser = await hall.organiser.post(`${briefing}/proposals/2/second`, {
      proposedAt: proposal?.at,
    });
    expect(organiser.error?.code).toBe('NOT_ALLOWED');
    expect((await hall.ines.get<BriefingTextView>(briefing)).data.version).toBe(1);
  });

  it('secondCorrection > other words under the same number meanwhile > STALE_PAGE, nobody seconds what they did not read', async () => {
    await correct(hall.lead);
    const [read] = await proposals();
    expect((await correct(hall.second)).error?.code).toBe('BRIEFING_PROPOSAL_WAITS');
    await hall.lead.delete(`${briefing}/proposals/2`);
    hall.server.clock.advance(1000);
    await correct(hall.lead, { whatChanged: 'Something else.' });
    const reply = await hall.second.post(`${briefing}/proposals/2/second`, { proposedAt: read?.at });
    expect(reply.error?.code).toBe('STALE_PAGE');
    expect(await proposals()).toHaveLength(1);
  });

  it('proposeVersion > a change while a correction waits > the correction of the older text is withdrawn and logged', async () => {
    await correct(hall.lead);
    await change(hall.second, hall.server.clock.now());
    expect(await proposals()).toEqual([]);
    expect(await logged(hall, 'briefing.proposal-withdrawn')).toMatchObject([
      { subject: { version: 2, proposedBy: hall.leadId } },
    ]);
  });
});
