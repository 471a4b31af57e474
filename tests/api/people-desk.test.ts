import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { PersonRecord, SessionView, Snapshot } from '../../shared/contracts/live';
import type { LeavingView } from '../../shared/contracts/people';
import type { Duty } from '../../shared/accounts';
import { inScope, seedPerson, signedInClient } from '../support/fixtures';
import { rows, seedAccount } from '../support/fixtures-accounts';
import { logged, openHall, signsOff, type Hall } from '../support/fixtures-safety';
import { seedTraveller } from '../support/fixtures-steps';
import type { TestClient } from '../support/test-server';

let hall: Hall;
let people: string;

beforeEach(async () => {
  hall = await openHall();
  people = `${hall.base}/people`;
});
afterEach(() => hall.server.close());

const seed = (wish: Parameters<typeof seedPerson>[2]) =>
  seedPerson(hall.server.app, hall.installationId, wish);
const confirm = (
  personId: string,
  body: object = { ageBand: '18+' },
  client = hall.organiser,
  key?: string,
) => client.post<{ onSite: number; hallLimit: number }>(`${people}/${personId}/confirm`, body, key);
const live = async (client: TestClient) => (await client.get<Snapshot>(`${hall.base}/live`)).data;
const seen = async (client: TestClient, personId: string): Promise<PersonRecord | undefined> =>
  (await live(client)).records.people.find((person) => person.id === personId);
const stored = async (personId: string) => {
  const [row] = await rows<Record<string, unknown>>(
    hall.server,
    'SELECT * FROM person WHERE id = ?',
    personId,
  );
  return row ?? {};
};
const setLimit = (limit: number) => rows(hall.server, 'UPDATE installation SET hall_limit = ?', limit);

/** Ines claims a step without a hazard. */
async function claimsStep(): Promise<string> {
  const { stepIds } = await seedTraveller(hall.server.app, hall.installationId, hall.glueId, [{}]);
  const stepId = stepIds[0] ?? '';
  const reply = await hall.ines.post(`${hall.base}/steps/${stepId}/claim`);
  if (reply.status !== 200) throw new Error(reply.text);
  return stepId;
}

async function lendGun(personId: string): Promise<void> {
  await inScope(hall.server.app, hall.installationId, async ({ manager, now }) => {
    await manager.query(
      `INSERT INTO tool (id, installation_id, number, name, kind, traits, condition, revision)
       VALUES ('gun', ?, 'G-07', 'low-temperature gun', 'glue gun', '{}', 'good', 1)`,
      [hall.installationId],
    );
    await manager.query(
      `INSERT INTO checkout (id, installation_id, tool_id, person_id, out_at, out_by, back_by, revision)
       VALUES ('out', ?, 'gun', ?, ?, 'x', ?, 1)`,
      [hall.installationId, personId, now, now],
    );
  });
}

describe('confirming', () => {
  it('confirmPerson > by the muster desk > on site, names seen, age band as the desk saw it, logged for the person', async () => {
    const deskId = await seed({ duties: ['muster desk'] });
    const desk = await signedInClient(hall.server, deskId);
    const boId = await seed({
      firstName: 'Bo',
      initial: '',
      confirmed: false,
      ageBand: '16-17',
      adultName: 'Lena M',
    });
    const bo = await signedInClient(hall.server, boId);
    expect((await live(bo)).audience).toBe('door');
    const reply = await confirm(boId, { ageBand: '13-15' }, desk);
    expect(reply.data).toEqual({ personId: boId, onSite: 6, hallLimit: 80 });
    const view = await live(bo);
    expect(view.audience).toBe('people');
    expect(view.records.people.map((person) => person.name)).toContain('Lena M');
    expect(view.records.people.find((person) => person.id === hall.leadId)?.details).toBeNull();
    expect(await seen(desk, boId)).toMatchObject({
      name: 'Bo',
      confirmed: true,
      onSite: true,
      details: { ageBand: '13-15', adultName: 'Lena M' },
    });
    expect(await stored(boId)).toMatchObject({ confirmed_by: deskId, confirmed_at: hall.server.clock.now() });
    expect(await logged(hall, 'person.confirmed')).toMatchObject([
      {
        actor: `person:${deskId}`,
        forPersonId: boId,
        subject: { personId: boId, ageBand: '13-15', said: '16-17' },
      },
    ]);
  });

  it('confirmPerson > the hall is full > HALL_FULL with the numbers, the person stays outside; one leaves > let in', async () => {
    const boId = await seed({ firstName: 'Bo', confirmed: false });
    await setLimit(4);
    const full = await confirm(boId);
    expect(full.error).toMatchObject({ code: 'HALL_FULL', details: { onSite: 4, hallLimit: 4 } });
    expect(full.error?.message).toContain('4 of 4');
    expect(await stored(boId)).toMatchObject({ confirmed_at: null });
    await hall.organiser.post(`${people}/${hall.inesId}/sign-out`);
    expect((await confirm(boId)).data).toMatchObject({ onSite: 4 });
  });

  it('confirmPerson > two desks confirm two people for the last place at once > exactly one is in', async () => {
    const ids = [await seed({ confirmed: false }), await seed({ confirmed: false })];
    await setLimit(5);
    const replies = await Promise.all(ids.map((id) => confirm(id)));
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 409]);
  });

  it('confirmPerson > already there > ALREADY_CONFIRMED; the same key again > the first answer', async () => {
    const boId = await seed({ confirmed: false });
    const first = await confirm(boId, undefined, hall.organiser, 'confirm-bo-1');
    expect((await confirm(boId)).error?.code).toBe('ALREADY_CONFIRMED');
    const again = await confirm(boId, undefined, hall.organiser, 'confirm-bo-1');
    expect([again.status, again.data]).toEqual([200, first.data]);
    expect(await logged(hall, 'person.confirmed')).toHaveLength(1);
  });

  it('confirmPerson > the desk sees a minor who named no adult > ADULT_MISSING at the field; with the adult > confirmed', async () => {
    const boId = await seed({ confirmed: false });
    const refused = await confirm(boId, { ageBand: '16-17' });
    expect(refused.error).toMatchObject({ code: 'ADULT_MISSING', fields: [{ path: 'adultName' }] });
    expect((await confirm(boId, { ageBand: '16-17', adultName: 'Lena M' })).status).toBe(200);
    expect(await stored(boId)).toMatchObject({ age_band: '16-17', adult_name: 'Lena M' });
  });

  it('confirmPerson > by a volunteer, or for a person of another installation > refused', async () => {
    const boId = await seed({ confirmed: false });
    expect((await confirm(boId, undefined, hall.ines)).error?.code).toBe('NOT_ALLOWED');
    expect((await confirm('somebody-else')).status).toBe(404);
  });
});

describe('leaving', () => {
  it('leaveSite > with a step in hand and a gun > place given back, the gun named, still listed, comes back through the desk', async () => {
    const stepId = await claimsStep();
    await lendGun(hall.inesId);
    const reply = await hall.ines.post<LeavingView>(`${hall.base}/leave`);
    expect(reply.data).toEqual({
      personId: hall.inesId,
      givenBack: [stepId],
      toolsOut: [{ id: 'gun', number: 'G-07', name: 'low-temperature gun' }],
    });
    expect(await rows(hall.server, 'SELECT ended_at FROM claim WHERE person_id = ?', hall.inesId)).toEqual([
      { ended_at: hall.server.clock.now() },
    ]);
    expect(await seen(hall.lead, hall.inesId)).toMatchObject({
      confirmed: true,
      onSite: false,
      removed: false,
    });
    expect((await live(hall.ines)).audience).toBe('door');
    expect(await logged(hall, 'person.left')).toMatchObject([
      { subject: { givenBack: [stepId], toolsOut: ['gun'] } },
    ]);
    expect((await hall.ines.post(`${hall.base}/leave`)).error?.code).toBe('PERSON_NOT_ON_SITE');
    expect((await confirm(hall.inesId)).status).toBe(200);
    expect(await seen(hall.lead, hall.inesId)).toMatchObject({ onSite: true });
  });

  it('leaveSite > by the desk > the same, logged as the desk’s; not for somebody at the door', async () => {
    expect((await hall.organiser.post(`${people}/${hall.inesId}/sign-out`)).status).toBe(200);
    expect(await logged(hall, 'person.signed-out')).toMatchObject([
      { actor: `person:${hall.organiserId}`, forPersonId: hall.inesId },
    ]);
    const boId = await seed({ confirmed: false });
    expect((await hall.organiser.post(`${people}/${boId}/sign-out`)).error?.code).toBe('PERSON_NOT_ON_SITE');
  });

  it('removePerson > session ends at once, places given back, record stays as removed', async () => {
    const stepId = await claimsStep();
    const reply = await hall.organiser.delete<LeavingView>(`${people}/${hall.inesId}`);
    expect(reply.data.givenBack).toEqual([stepId]);
    expect((await hall.ines.get<SessionView>('/session')).data.principal).toBeNull();
    expect((await hall.ines.get(`${hall.base}/live`)).status).toBe(401);
    expect(await seen(hall.lead, hall.inesId)).toMatchObject({ removed: true, onSite: false });
    expect((await hall.organiser.delete(`${people}/${hall.inesId}`)).status).toBe(404);
  });
});

describe('duties', () => {
  const setDuty = (personId: string, duty: Duty, on: boolean, client = hall.organiser) =>
    client.put<{ duties: Duty[] }>(`${people}/${personId}/duties`, { duty, on });

  it('changeDuty > given and taken > stored, seen, moves the audience, logged; a person without one is a volunteer', async () => {
    expect((await setDuty(hall.inesId, 'crib keeper', true)).data.duties).toEqual(['crib keeper']);
    expect((await setDuty(hall.inesId, 'checker', true)).data.duties).toEqual(['crib keeper', 'checker']);
    expect((await live(hall.ines)).audience).toBe('leads');
    await setDuty(hall.inesId, 'crib keeper', false);
    expect((await setDuty(hall.inesId, 'checker', false)).data.duties).toEqual(['volunteer']);
    expect((await live(hall.ines)).audience).toBe('people');
    expect((await logged(hall, 'person.duty-given')).map((row) => row.subject.duty)).toEqual([
      'crib keeper',
      'checker',
    ]);
    expect(await logged(hall, 'person.duty-taken')).toHaveLength(2);
    const before = await logged(hall, 'person.duty-given');
    await setDuty(hall.leadId, 'safety lead', true);
    expect(await logged(hall, 'person.duty-given')).toEqual(before);
  });

  it('changeDuty, removePerson > one of the two safety leads of a published installation > LAST_SAFETY_LEAD; with a third > done', async () => {
    const refused = await setDuty(hall.leadId, 'safety lead', false);
    expect(refused.error).toMatchObject({ code: 'LAST_SAFETY_LEAD', details: { leads: 2, needed: 2 } });
    expect((await hall.organiser.delete(`${people}/${hall.leadId}`)).error?.code).toBe('LAST_SAFETY_LEAD');
    await setDuty(hall.inesId, 'safety lead', true);
    expect((await setDuty(hall.leadId, 'safety lead', false)).data.duties).toEqual(['volunteer']);
  });

  it('changeDuty > by somebody who is no organiser, or the duty volunteer > refused', async () => {
    expect((await setDuty(hall.inesId, 'checker', true, hall.lead)).error?.code).toBe('NOT_ALLOWED');
    expect((await setDuty(hall.inesId, 'volunteer', true)).error?.code).toBe('VALIDATION');
  });

  const add = (body: object) =>
    hall.organiser.post<{ personId: string }>(people, {
      firstName: 'Cy',
      initial: 'm',
      duties: ['checker'],
      ...body,
    });

  it('addMember > an account > a place with duties, waits for the desk, its owner sees the installation', async () => {
    const accountId = await seedAccount(hall.server, 'cy@hall.example');
    const { personId } = (await add({ email: 'CY@hall.example' })).data;
    expect(await stored(personId)).toMatchObject({
      account_id: accountId,
      number: 5,
      duties: '["checker"]',
      confirmed_at: null,
    });
    const cy = await signedInClient(hall.server, `account:${accountId}`);
    expect((await cy.get<SessionView>('/session')).data.principal).toMatchObject({
      installations: [
        { installationId: hall.installationId, personId, duties: ['checker'], confirmed: false },
      ],
    });
    const twice = await add({ email: 'cy@hall.example' });
    expect(twice.error?.fields).toMatchObject([{ path: 'email', code: 'taken' }]);
  });

  it('addMember > no such account > told at the field to invite first; every wrong field at once', async () => {
    const unknown = await add({ email: 'nobody@hall.example' });
    expect(unknown.error?.fields).toMatchObject([{ path: 'email', code: 'unknown' }]);
    expect(unknown.error?.fields?.[0]?.message).toContain('Invite them first');
    const wrong = await add({ email: 'x', firstName: '', initial: 'mm', duties: ['king'] });
    expect(wrong.error?.fields?.map((field) => field.path).sort()).toEqual([
      'duties.0',
      'email',
      'firstName',
      'initial',
    ]);
  });

  it('addMember > removed before > the same person and number again', async () => {
    await seedAccount(hall.server, 'cy@hall.example');
    const { personId } = (await add({ email: 'cy@hall.example' })).data;
    await hall.organiser.delete(`${people}/${personId}`);
    expect((await add({ email: 'cy@hall.example', duties: [] })).data.personId).toBe(personId);
    expect(await stored(personId)).toMatchObject({ removed_at: null, duties: '["volunteer"]', number: 5 });
  });
});

describe('erasing', () => {
  const erase = (personId: string) => hall.organiser.post(`${people}/${personId}/erase`);

  it('erasePerson > after the installation closed > name, mail, adult, signature gone everywhere, number and deeds stay, the register still verifies', async () => {
    const boId = await seed({
      firstName: 'Bodo',
      initial: 'Z',
      email: 'bodo@hall.example',
      adultName: 'Lena M',
    });
    const bo = await signedInClient(hall.server, boId);
    await signsOff(hall, bo);
    const refused = await hall.organiser.post(`${people}/${boId}/confirm`, { ageBand: '18+' });
    expect(refused.error?.message).toContain('Bodo Z');
    await hall.organiser.post(`${hall.base}/close`);
    expect((await erase(boId)).status).toBe(200);
    expect(await seen(hall.lead, boId)).toMatchObject({ name: 'erased 5', removed: true, details: null });
    expect((await bo.get<SessionView>('/session')).data.principal).toBeNull();
    const everything = JSON.stringify(
      await Promise.all(
        ['person', 'register_row', 'sign_off', 'day_log', 'idempotency', 'session'].map((table) =>
          rows(hall.server, `SELECT * FROM ${table}`),
        ),
      ),
    );
    for (const trace of ['Bodo', 'bodo@hall.example']) expect(everything).not.toContain(trace);
    const register = await hall.lead.get<{ verified: object }>(`${hall.base}/register`);
    expect(register.data.verified).toEqual({ ok: true });
    expect(await logged(hall, 'person.erased')).toHaveLength(1);
    expect((await erase(boId)).status).toBe(200);
    expect(await logged(hall, 'person.erased')).toHaveLength(1);
  });

  it('erasePerson > a tool still out > IN_USE names it, nothing is erased', async () => {
    await lendGun(hall.inesId);
    const reply = await erase(hall.inesId);
    expect(reply.error?.code).toBe('IN_USE');
    expect(reply.error?.message).toContain('G-07');
    expect(await stored(hall.inesId)).toMatchObject({ first_name: 'Ines', erased_at: null });
  });

  it('erasePerson > a safety lead of a published installation with two > LAST_SAFETY_LEAD', async () => {
    expect((await erase(hall.leadId)).error?.code).toBe('LAST_SAFETY_LEAD');
  });
});
