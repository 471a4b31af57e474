import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { AnswerResult, BriefingTextView } from '../../shared/contracts/safety';
import type { SignOffRecord, Snapshot } from '../../shared/contracts/live';
import { HOT_GLUE_BODY } from '../../shared/safety';
import { missingSignOffs } from '../../server/modules/safety';
import { inScope, seedPerson, signedInClient } from '../support/fixtures';
import {
  answersWith,
  logged,
  openHall,
  signs,
  signsOff,
  stored,
  TYPED,
  type Hall,
} from '../support/fixtures-safety';
import { TEST_NOW, type TestClient } from '../support/test-server';

let hall: Hall;
let briefing: string;

beforeEach(async () => {
  hall = await openHall();
  briefing = `${hall.base}/briefings/hot-glue`;
});
afterEach(() => hall.server.close());

const missing = (personId: string, now = hall.server.clock.now()) =>
  inScope(hall.server.app, hall.installationId, ({ manager }) =>
    missingSignOffs(manager, hall.installationId, personId, now),
  );
const answer = (client: TestClient, wrongIds: string[] = [], version = 1) =>
  client.post<AnswerResult>(`${briefing}/answers`, { version, answers: answersWith(wrongIds) });
const signOffsOf = async (client: TestClient): Promise<SignOffRecord[]> =>
  (await client.get<Snapshot>(`${hall.base}/live`)).data.records.signOffs;

describe('reading a briefing', () => {
  it('readBriefingText > anybody who joined > the whole text without right answers or reasons', async () => {
    const doorId = await seedPerson(hall.server.app, hall.installationId, { confirmed: false });
    const door = await signedInClient(hall.server, doorId);
    const reply = await door.get<BriefingTextView>(briefing);
    expect(reply.status).toBe(200);
    expect(reply.data).toMatchObject({ key: 'hot-glue', version: 1, kind: 'first', whatChanged: null });
    expect(reply.data.body.panels).toHaveLength(HOT_GLUE_BODY.panels.length);
    expect(reply.data.body.questions).toHaveLength(HOT_GLUE_BODY.questions.length);
    for (const question of reply.data.body.questions) {
      expect(Object.keys(question).sort()).toEqual(['id', 'options', 'text']);
    }
    for (const { why } of HOT_GLUE_BODY.questions) expect(reply.text).not.toContain(why);
  });

  it.each(['/briefings/ladders', '/briefings/hot-glue?version=2'])(
    'readBriefingText > %s is not there > NOT_FOUND',
    async (path) => {
      const reply = await hall.ines.get(`${hall.base}${path}`);
      expect([reply.status, reply.error?.code]).toEqual([404, 'NOT_FOUND']);
    },
  );
});

describe('answering', () => {
  it('answerSheet > one miss, then all right > kept attempts, passed, each question with its reason', async () => {
    const first = await answer(hall.ines, ['how-long']);
    expect(first.data).toMatchObject({ passed: false, talkNeeded: false });
    expect(first.data.results.filter((result) => !result.right).map((result) => result.questionId)).toEqual([
      'how-long',
    ]);
    expect(first.data.results[0]?.why).toBe(HOT_GLUE_BODY.questions[0]?.why);
    hall.server.clock.advance(60_000);
    expect((await answer(hall.ines)).data).toMatchObject({ passed: true, talkNeeded: false });
    expect(await signOffsOf(hall.ines)).toMatchObject([
      {
        attempts: [
          { at: TEST_NOW, wrongIds: ['how-long'] },
          { at: TEST_NOW + 60_000, wrongIds: [] },
        ],
        passedAt: TEST_NOW + 60_000,
        signedAt: null,
      },
    ]);
    expect((await logged(hall, 'briefing.answered')).map((entry) => entry.subject.passed)).toEqual([
      false,
      true,
    ]);
  });

  it('answerSheet > before the desk has confirmed > accepted and signed, but it does not count', async () => {
    const doorId = await seedPerson(hall.server.app, hall.installationId, { confirmed: false });
    const door = await signedInClient(hall.server, doorId);
    const signOffId = await signs(hall, door);
    const reply = await hall.lead.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
    expect(reply.error).toMatchObject({ code: 'PERSON_NOT_CONFIRMED', details: { personId: doorId } });
    expect((await missing(doorId))['hot-glue']).toBe('NOT_COUNTERSIGNED');
  });

  it('answerSheet > questions left out and an answer of no question > every one named, nothing kept', async () => {
    const { 'how-long': _out, ...rest } = answersWith();
    const answers = { ...rest, 'pass-gun': 'throw' };
    const reply = await hall.ines.post(`${briefing}/answers`, { version: 1, answers });
    expect(reply.status).toBe(400);
    expect(reply.error?.fields?.map((field) => field.path)).toEqual(['answers.how-long', 'answers.pass-gun']);
    expect(await stored(hall, 'SELECT id FROM sign_off WHERE installation_id = ?')).toEqual([]);
  });

  it('answerSheet > one question missed twice > BRIEFING_TALK_NEEDED until a lead notes the talk', async () => {
    await answer(hall.ines, ['how-long', 'pass-gun']);
    hall.server.clock.advance(1000);
    const second = await answer(hall.ines, ['how-long']);
    expect(second.data.talkNeeded).toBe(true);
    hall.server.clock.advance(1000);
    const refused = await answer(hall.ines);
    expect(refused.error).toMatchObject({
      code: 'BRIEFING_TALK_NEEDED',
      details: { questionIds: ['how-long'] },
    });
    const [signOff] = await signOffsOf(hall.lead);
    expect(signOff?.attempts).toHaveLength(2);
    const talk = `${hall.base}/sign-offs/${signOff?.id}/talk`;
    expect((await hall.ines.post(talk)).error?.code).toBe('NOT_ALLOWED');
    expect((await hall.lead.post(talk)).status).toBe(200);
    expect((await hall.second.post(talk)).error?.code).toBe('STALE_PAGE');
    hall.server.clock.advance(1000);
    expect((await answer(hall.ines)).data.passed).toBe(true);
    expect(await logged(hall, 'briefing.talked')).toMatchObject([
      { actor: `person:${hall.leadId}`, forPersonId: hall.inesId, subject: { questionIds: ['how-long'] } },
    ]);
  });

  it('noteTalk > a safety lead who missed twice > not for the own sheet, another lead has to', async () => {
    await answer(hall.lead, ['how-long']);
    await answer(hall.lead, ['how-long']);
    const [signOff] = await signOffsOf(hall.lead);
    const talk = `${hall.base}/sign-offs/${signOff?.id}/talk`;
    expect((await hall.lead.post(talk)).error?.code).toBe('COUNTERSIGN_SELF');
    expect((await hall.second.post(talk)).status).toBe(200);
  });

  it('answerSheet > the sheet is passed already > BRIEFING_PASSED, the pass stands', async () => {
    await answer(hall.ines);
    expect((await answer(hall.ines, ['how-long'])).error?.code).toBe('BRIEFING_PASSED');
    expect((await signOffsOf(hall.ines))[0]?.attempts).toHaveLength(1);
  });
});

describe('signing', () => {
  it('signBriefing > not passed yet > BRIEFING_NOT_PASSED, nothing in the register', async () => {
    await answer(hall.ines, ['how-long']);
    const reply = await hall.ines.post(`${briefing}/sign`, { version: 1, signature: TYPED });
    expect(reply.error?.code).toBe('BRIEFING_NOT_PASSED');
    expect(
      await stored(hall, "SELECT seq FROM register_row WHERE installation_id = ? AND kind = 'signed'"),
    ).toEqual([]);
  });

  it('signBriefing > signed twice > one record, the second is BRIEFING_SIGNED', async () => {
    const signOffId = await signs(hall, hall.ines);
    const again = await hall.ines.post(`${briefing}/sign`, { version: 1, signature: TYPED });
    expect(again.error).toMatchObject({ code: 'BRIEFING_SIGNED', details: { signOffId } });
    expect((await answer(hall.ines)).error?.code).toBe('BRIEFING_SIGNED');
    expect(await stored(hall, 'SELECT id FROM sign_off WHERE installation_id = ?')).toEqual([
      { id: signOffId },
    ]);
  });

  it('signature > a lead asks for it > shown to leads and organisers only, never in the live record', async () => {
    const signOffId = await signs(hall, hall.ines);
    const path = `${hall.base}/sign-offs/${signOffId}/signature`;
    expect((await hall.lead.get(path)).data).toEqual(TYPED);
    expect((await hall.ines.get(path)).error?.code).toBe('NOT_ALLOWED');
    expect((await hall.lead.get(`${hall.base}/live`)).text).not.toContain(TYPED.value);
  });

  it('signBriefing > a drawing with letters that are no path > refused beside its field', async () => {
    await answer(hall.ines);
    const signature = { kind: 'drawn', value: 'M 0 0 <script>' };
    const reply = await hall.ines.post(`${briefing}/sign`, { version: 1, signature });
    expect(reply.error?.fields).toMatchObject([{ path: 'signature.value' }]);
  });
});

describe('countersigning', () => {
  it('countersignSignOff > by a safety lead > counts for a year, with record, log and live record', async () => {
    expect(await missing(hall.inesId)).toEqual({
      'hot-glue': 'NOT_READ',
      cutting: 'NO_BRIEFING',
      'solvent-spray': 'NO_BRIEFING',
      ladder: 'NO_BRIEFING',
      overhead: 'NO_BRIEFING',
    });
    const signOffId = await signs(hall, hall.ines);
    expect((await missing(hall.inesId))['hot-glue']).toBe('NOT_COUNTERSIGNED');
    const now = hall.server.clock.now();
    const reply = await hall.lead.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
    const expiresAt = now + 365 * 86_400_000;
    expect(reply.data).toEqual({ signOffId, as: 'safety lead', expiresAt });
    expect(await signOffsOf(hall.ines)).toMatchObject([
      { countersignedBy: hall.leadId, countersignedAs: 'safety lead', countersignedAt: now, expiresAt },
    ]);
    expect(await logged(hall, 'briefing.countersigned')).toMatchObject([
      { actor: `person:${hall.leadId}`, forPersonId: hall.inesId, subject: { signOffId } },
    ]);
    expect(await missing(hall.inesId, expiresAt - 1)).not.toHaveProperty('hot-glue');
    expect((await missing(hall.inesId, expiresAt))['hot-glue']).toBe('EXPIRED');
    const other = await hall.second.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
    expect(other.error?.code).toBe('BRIEFING_SIGNED');
    expect(other.error?.message).toContain('Lena M.');
  });

  it('countersignSignOff > a safety lead for herself > COUNTERSIGN_SELF, still missing', async () => {
    const signOffId = await signs(hall, hall.lead);
    const reply = await hall.lead.post(`${hall.base}/sign-offs/${signOffId}/countersign`);
    expect(reply.error?.code).toBe('COUNTERSIGN_SELF');
    expect((await missing(hall.leadId))['hot-glue']).toBe('NOT_COUNTERSIGNED');
  });

  it('countersignSignOff > an organiser > only where the one safety lead on site is the signer, and logged', async () => {
    const ofInes = await signs(hall, hall.ines);
    const ofLead = await signs(hall, hall.lead);
    const countersign = (id: string) => hall.organiser.post(`${hall.base}/sign-offs/${id}/countersign`);
    expect((await countersign(ofLead)).error?.code).toBe('COUNTERSIGN_NOT_LEAD');
    await stored(hall, 'UPDATE person SET left_at = 1 WHERE installation_id = ? AND id = ?', hall.secondId);
    expect((await countersign(ofInes)).error?.code).toBe('COUNTERSIGN_NOT_LEAD');
    expect((await countersign(ofLead)).data).toMatchObject({ as: 'organiser' });
    expect(await logged(hall, 'briefing.countersigned')).toMatchObject([
      { actor: `person:${hall.organiserId}`, subject: { as: 'organiser', exception: expect.any(String) } },
    ]);
  });

  it('countersignSignOff > not signed yet, and an id of another installation > refused', async () => {
    await answer(hall.ines);
    const [open] = await signOffsOf(hall.lead);
    const reply = await hall.lead.post(`${hall.base}/sign-offs/${open?.id}/countersign`);
    expect(reply.error?.code).toBe('BRIEFING_NOT_SIGNED');
    const unknown = await hall.lead.post(`${hall.base}/sign-offs/elsewhere/countersign`);
    expect(unknown.error?.code).toBe('NOT_FOUND');
  });

  it('revokeSignOff > with a reason > nothing signed before counts, a new round does', async () => {
    const signOffId = await signsOff(hall, hall.ines);
    const path = `${hall.base}/sign-offs/${signOffId}/revoke`;
    expect((await hall.lead.post(path, { reason: '' })).error?.fields?.[0]?.path).toBe('reason');
    hall.server.clock.advance(1000);
    const reply = await hall.lead.post(path, { reason: 'left a hot gun on the bench' });
    expect(reply.data).toEqual({ signOffId, workInHand: [] });
    expect((await missing(hall.inesId))['hot-glue']).toBe('REVOKED');
    expect((await hall.lead.post(path, { reason: 'again' })).error?.code).toBe('SIGN_OFF_REVOKED');
    const again = await signsOff(hall, hall.ines);
    expect(again).not.toBe(signOffId);
    expect(await missing(hall.inesId)).not.toHaveProperty('hot-glue');
  });

  it('live record > of another person > leads see it, other volunteers and the door do not', async () => {
    await signsOff(hall, hall.ines);
    const maraId = await seedPerson(hall.server.app, hall.installationId, { firstName: 'Mara' });
    const mara = await signedInClient(hall.server, maraId);
    expect(await signOffsOf(mara)).toEqual([]);
    expect(await signOffsOf(hall.lead)).toHaveLength(1);
    expect(await signOffsOf(hall.ines)).toHaveLength(1);
  });
});

describe('a closed installation', () => {
  it('answerSheet > installation closed > INSTALLATION_CLOSED, reading still works', async () => {
    await stored(hall, "UPDATE installation SET status = 'closed' WHERE id = ?");
    expect((await answer(hall.ines)).error?.code).toBe('INSTALLATION_CLOSED');
    expect((await hall.ines.get(briefing)).status).toBe(200);
  });
});
