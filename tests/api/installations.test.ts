import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type {
  DisplayTokenView,
  InstallationListItem,
  JoinCodeView,
  PublishCheck,
} from '../../shared/contracts/installations';
import type { InstallationRecord, SessionView, Snapshot } from '../../shared/contracts/live';
import { newId } from '../../shared/kernel/ids';
import { inScope, seedInstallation, seedPerson, signedInClient } from '../support/fixtures';
import { accountClient, rows } from '../support/fixtures-accounts';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

const PLAN = {
  name: 'Lantern canopy',
  venue: 'Weir Hall',
  timeZone: 'Europe/Lisbon',
  unit: 'mm',
  hallLimit: 80,
};
const DAY = {
  date: '2027-06-12',
  doors: '09:00',
  start: '09:30',
  clearUp: '17:00',
  end: '18:00',
  breaks: [{ from: '12:00', to: '12:45', label: 'soup' }],
};

let server: TestServer;
let organiser: TestClient;
let accountId: string;

beforeEach(async () => {
  server = await startTestServer();
  ({ client: organiser, accountId } = await accountClient(server, 'mara@hall.example', 'organiser'));
});
afterEach(() => server.close());

interface InstallationView {
  installation: InstallationRecord;
  publishChecks: PublishCheck[];
}
const create = async (more: object = {}) => {
  const reply = await organiser.post<{ id: string }>('/installations', { ...PLAN, ...more });
  if (reply.status !== 201) throw new Error(reply.text);
  return reply.data.id;
};
const read = async (id: string, client = organiser) =>
  (await client.get<InstallationView>(`/installations/${id}`)).data;
const live = async (id: string, client = organiser) =>
  (await client.get<Snapshot>(`/installations/${id}/live`)).data;
const logOf = async (id: string) =>
  (
    await rows<{ action: string; actor: string; subject: string }>(
      server,
      'SELECT action, actor, subject FROM day_log WHERE installation_id = ? ORDER BY seq',
      id,
    )
  ).map((row) => ({ ...row, subject: JSON.parse(row.subject) as Record<string, unknown> }));

/** What publishing asks for beside days and stations, straight into the tables. */
async function seedPiece(id: string, stationId: string, hazards: string[]): Promise<void> {
  await inScope(server.app, id, async ({ manager }) => {
    await manager.query(
      `INSERT INTO sub_assembly (id, installation_id, frame_id, code, name, position, traveller_revision, revision)
       VALUES ('piece', ?, 'frame', 'V-01', 'Lantern', 1, 1, 1)`,
      [id],
    );
    await manager.query(
      `INSERT INTO step (id, installation_id, sub_assembly_id, position, operation, name, station_id, hazards, tool_kinds,
         crew_min, crew_max, planned_seconds, needs_check, state, flags, revision)
       VALUES (?, ?, 'piece', 1, 'tack', 'tack', ?, ?, '[]', 1, 1, 600, 0, 'ready', '[]', 1)`,
      [newId(), id, stationId, JSON.stringify(hazards)],
    );
  });
}

describe('creating', () => {
  it('createInstallation > by a site organiser > draft with a sayable code, the creator its confirmed organiser, hot-glue briefing, one log', async () => {
    const id = await create();
    const { installation } = await read(id);
    expect(installation).toEqual({
      id,
      revision: 1,
      status: 'draft',
      settings: { maxInHand: 2, ageChanges: [] },
      ...PLAN,
    });
    const { joinCode, joinUrl } = (await organiser.get<JoinCodeView>(`/installations/${id}/join-code`)).data;
    expect(joinCode).toMatch(/^[ACEFGHJKLMNQRSTUVWXYZ2-9]{6}$/);
    expect(joinUrl).toMatch(new RegExp(`^http://localhost:\\d+/join/${joinCode}$`));
    const state = await live(id);
    expect(state.records.people).toMatchObject([
      { name: 'Mara Q', number: 1, duties: ['organiser'], confirmed: true, onSite: true },
    ]);
    expect(state.records.briefings).toMatchObject([{ key: 'hot-glue' }]);
    expect(await logOf(id)).toMatchObject([
      { action: 'installation.created', actor: `account:${accountId}`, subject: { installationId: id } },
      { action: 'person.added' },
    ]);
    const session = (await organiser.get<SessionView>('/session')).data.principal;
    expect(session).toMatchObject({
      installations: [{ installationId: id, duties: ['organiser'], confirmed: true }],
    });
  });

  it('createInstallation > the same key again > the same id, one installation', async () => {
    const first = await organiser.post<{ id: string }>('/installations', PLAN, 'make-it-once');
    const again = await organiser.post<{ id: string }>('/installations', PLAN, 'make-it-once');
    expect(again.data).toEqual(first.data);
    expect(await rows(server, 'SELECT 1 FROM installation')).toHaveLength(1);
  });

  it('createInstallation > every field wrong > every problem beside its field at once, nothing is made', async () => {
    const reply = await organiser.post('/installations', {
      name: ' ',
      venue: 'x'.repeat(121),
      timeZone: 'Hall/Time',
      unit: 'cubit',
      hallLimit: 0,
      colour: 'red',
    });
    expect(reply.error?.code).toBe('VALIDATION');
    expect(reply.error?.fields?.map((field) => field.path).sort()).toEqual([
      'colour',
      'hallLimit',
      'name',
      'timeZone',
      'unit',
      'venue',
    ]);
    for (const field of reply.error?.fields ?? []) expect(field.message).toMatch(/^[A-Z].*[.?]$/);
    expect(await rows(server, 'SELECT 1 FROM installation')).toEqual([]);
  });

  it('listInstallations > own ones, newest first; an administrator sees all, a stranger none', async () => {
    const first = await create();
    server.clock.advance(1000);
    const second = await create({ name: 'Second' });
    await organiser.post(`/installations/${first}/build-days`, DAY);
    const list = async (client: TestClient) =>
      (await client.get<InstallationListItem[]>('/installations')).data;
    expect(await list(organiser)).toMatchObject([
      { id: second, name: 'Second', firstDate: null, people: 1, duties: ['organiser'] },
      { id: first, firstDate: '2027-06-12', subAssemblies: 0 },
    ]);
    const admin = await accountClient(server, 'root@hall.example', 'admin');
    expect(await list(admin.client)).toMatchObject([{ id: second, duties: [] }, { id: first }]);
    const stranger = await accountClient(server, 'cy@hall.example', 'organiser');
    expect(await list(stranger.client)).toEqual([]);
    expect((await stranger.client.get(`/installations/${first}`)).status).toBe(404);
  });
});

describe('editing', () => {
  const edit = (id: string, revision: number, more: object = {}, client = organiser) =>
    client.put<InstallationRecord>(`/installations/${id}`, {
      ...PLAN,
      maxInHand: 2,
      ageChanges: [],
      ...more,
      revision,
    });

  it('editInstallation > from the newest revision > stored, live record renewed, log names the fields', async () => {
    const id = await create();
    const reply = await edit(id, 1, { hallLimit: 60, ageChanges: [{ key: 'ladder-height', value: '1200' }] });
    expect(reply.data).toMatchObject({
      hallLimit: 60,
      settings: { ageChanges: [{ key: 'ladder-height', value: '1200' }] },
    });
    const { installation } = await read(id);
    expect(installation).toEqual(reply.data);
    const catchUp = await organiser.get<{ changed: { installation: InstallationRecord[] } }>(
      `/installations/${id}/changes?since=1`,
    );
    expect(catchUp.data.changed.installation).toEqual([installation]);
    expect((await logOf(id)).at(-1)).toMatchObject({
      action: 'installation.edited',
      subject: { fields: ['hallLimit', 'ageChanges'] },
    });
  });

  it('editInstallation > a page older than another edit > STALE_PAGE with what changed, nothing is overwritten', async () => {
    const id = await create();
    await edit(id, 1, { hallLimit: 60 });
    const stale = await edit(id, 1, { name: 'Mine' });
    expect(stale.error).toMatchObject({
      code: 'STALE_PAGE',
      details: { fields: ['hallLimit'], current: { hallLimit: 60 } },
    });
    expect(stale.error?.message).toContain('hall limit');
    expect((await read(id)).installation).toMatchObject({ name: PLAN.name, hallLimit: 60 });
  });

  it('editInstallation > another part of the installation changed meanwhile > no stale page', async () => {
    const id = await create();
    await organiser.post(`/installations/${id}/stations`, { name: 'Glue', kind: 'glue', places: 6 });
    expect((await edit(id, 1, { name: 'Mine' })).status).toBe(200);
  });

  it('editInstallation > age rules looser than their default, unknown and no limit > each beside its field', async () => {
    const id = await create();
    const reply = await edit(id, 1, {
      ageChanges: [
        { key: 'powered-saw', value: '16-17' },
        { key: 'high-temperature-gun', value: '18+' },
        { key: 'juggling', value: '18+' },
        { key: 'ladder-height', value: 'low' },
      ],
    });
    expect(reply.error?.fields).toMatchObject([
      { path: 'ageChanges.0.value', code: 'LOOSER_THAN_DEFAULT' },
      { path: 'ageChanges.2.value', code: 'UNKNOWN_RULE' },
      { path: 'ageChanges.3.value', code: 'NOT_A_LIMIT' },
    ]);
    expect((await read(id)).installation.settings.ageChanges).toEqual([]);
  });
});

describe('publishing and closing', () => {
  it('publishInstallation > nothing there > PUBLISH_INCOMPLETE lists everything that is missing', async () => {
    const id = await create();
    const reply = await organiser.post(`/installations/${id}/publish`);
    expect(reply.error?.code).toBe('PUBLISH_INCOMPLETE');
    const missing = (reply.error?.details?.missing as PublishCheck[]).map((check) => check.key);
    expect(missing).toEqual(['build-day', 'station', 'sub-assembly', 'safety-leads']);
    for (const part of ['build day', 'station', 'sub-assembly', '2 safety leads'])
      expect(reply.error?.message).toContain(part);
    expect((await read(id)).installation.status).toBe('draft');
  });

  it('publishInstallation > a hazard without a briefing > named; without that step > published, joining opens', async () => {
    const id = await create();
    await organiser.post(`/installations/${id}/build-days`, DAY);
    const station = await organiser.post<{ id: string }>(`/installations/${id}/stations`, {
      name: 'Glue',
      kind: 'glue',
      places: 6,
    });
    await seedPiece(id, station.data.id, ['hot-glue', 'ladder']);
    await seedPerson(server.app, id, { duties: ['safety lead'] });
    const code = (await organiser.get<JoinCodeView>(`/installations/${id}/join-code`)).data.joinCode;
    expect((await organiser.get(`/join/${code}`)).error?.code).toBe('INSTALLATION_NOT_PUBLISHED');
    await seedPerson(server.app, id, { duties: ['safety lead', 'bench lead'] });
    const refused = await organiser.post(`/installations/${id}/publish`);
    expect(refused.error?.details?.missing).toMatchObject([{ key: 'briefings', done: false }]);
    expect(refused.error?.message).toContain('ladder');
    expect(refused.error?.message).not.toContain('hot-glue,');
    await rows(server, `UPDATE step SET hazards = '["hot-glue"]'`);
    expect((await read(id)).publishChecks.every((check) => check.done)).toBe(true);
    expect((await organiser.post(`/installations/${id}/publish`)).data).toEqual({ status: 'published' });
    expect((await live(id)).records.installation).toMatchObject([{ status: 'published' }]);
    expect((await organiser.get(`/join/${code}`)).status).toBe(200);
    expect((await logOf(id)).at(-1)?.action).toBe('installation.published');
  });

  it('closeInstallation > then every change > INSTALLATION_CLOSED; reading goes on', async () => {
    const { installationId: id, glueId } = await seedInstallation(server.app);
    const personId = await seedPerson(server.app, id, { accountId, duties: ['organiser', 'muster desk'] });
    const day = await organiser.post<{ id: string }>(`/installations/${id}/build-days`, DAY);
    const display = await organiser.post<DisplayTokenView>(`/installations/${id}/displays`, {
      label: 'wall',
    });
    expect((await organiser.post(`/installations/${id}/close`)).data).toEqual({ status: 'closed' });
    const base = `/installations/${id}`;
    const before = await logOf(id);
    const replies = [
      await organiser.put(base, { ...PLAN, maxInHand: 2, ageChanges: [], revision: 3 }),
      await organiser.post(`${base}/publish`),
      await organiser.post(`${base}/close`),
      await organiser.post(`${base}/build-days`, { ...DAY, date: '2027-06-13' }),
      await organiser.put(`${base}/build-days/${day.data.id}`, DAY),
      await organiser.delete(`${base}/build-days/${day.data.id}`),
      await organiser.post(`${base}/stations`, { name: 'New', kind: 'glue', places: 6 }),
      await organiser.put(`${base}/stations/${glueId}`, { name: 'New', kind: 'glue', places: 6 }),
      await organiser.delete(`${base}/stations/${glueId}`),
      await organiser.post(`${base}/join-code`),
      await organiser.post(`${base}/displays`, { label: 'second' }),
      await organiser.post(`${base}/people`, {
        email: 'cy@hall.example',
        firstName: 'Cy',
        initial: '',
        duties: [],
      }),
      await organiser.post(`${base}/people/${personId}/confirm`, { ageBand: '18+' }),
      await organiser.post(`${base}/people/${personId}/sign-out`),
      await organiser.post(`${base}/leave`),
      await organiser.put(`${base}/people/${personId}/duties`, { duty: 'checker', on: true }),
      await organiser.delete(`${base}/people/${personId}`),
    ];
    expect(replies.map((reply) => reply.error?.code)).toEqual(replies.map(() => 'INSTALLATION_CLOSED'));
    expect(await logOf(id)).toEqual(before);
    expect((await read(id)).installation.status).toBe('closed');
    // Taking access away is always possible.
    expect((await organiser.delete(`${base}/displays/${display.data.id}`)).status).toBe(200);
  });
});

describe('build days', () => {
  it('build day > added, edited, removed > stored, live and logged; a removed one stays as removed', async () => {
    const id = await create();
    const added = await organiser.post<{ id: string }>(`/installations/${id}/build-days`, DAY);
    expect(added.status).toBe(201);
    await organiser.put(`/installations/${id}/build-days/${added.data.id}`, {
      ...DAY,
      end: '19:00',
      breaks: [],
    });
    expect((await live(id)).records.buildDays).toMatchObject([
      { id: added.data.id, end: '19:00', breaks: [], removed: false },
    ]);
    await organiser.delete(`/installations/${id}/build-days/${added.data.id}`);
    expect((await live(id)).records.buildDays).toMatchObject([{ id: added.data.id, removed: true }]);
    expect((await logOf(id)).map((row) => row.action).slice(2)).toEqual([
      'build-day.added',
      'build-day.edited',
      'build-day.removed',
    ]);
    expect((await organiser.put(`/installations/${id}/build-days/${added.data.id}`, DAY)).status).toBe(404);
  });

  it('build day > its times out of order and a break outside > each named at its own field; the same date twice > refused', async () => {
    const id = await create();
    const reply = await organiser.post(`/installations/${id}/build-days`, {
      date: '2027-02-30',
      doors: '10:00',
      start: '09:30',
      clearUp: '09:00',
      end: '08:00',
      breaks: [{ from: '23:00', to: '22:00', label: '' }],
    });
    const paths = reply.error?.fields?.map((field) => field.path) ?? [];
    expect(paths).toEqual(expect.arrayContaining(['date', 'breaks.0.label']));
    const order = await organiser.post(`/installations/${id}/build-days`, {
      ...DAY,
      doors: '10:00',
      clearUp: '09:00',
      end: '08:00',
      breaks: [{ from: '23:00', to: '22:00', label: 'late' }],
    });
    expect(order.error?.fields?.map((field) => field.path).sort()).toEqual([
      'breaks.0.from',
      'breaks.0.to',
      'clearUp',
      'end',
      'start',
    ]);
    await organiser.post(`/installations/${id}/build-days`, DAY);
    const twice = await organiser.post(`/installations/${id}/build-days`, DAY);
    expect(twice.error?.fields).toMatchObject([{ path: 'date', code: 'taken' }]);
  });

  it('build day > the only one of a published installation > IN_USE', async () => {
    const { installationId: id } = await seedInstallation(server.app);
    await seedPerson(server.app, id, { accountId, duties: ['organiser'] });
    const day = await organiser.post<{ id: string }>(`/installations/${id}/build-days`, DAY);
    expect((await organiser.delete(`/installations/${id}/build-days/${day.data.id}`)).error?.code).toBe(
      'IN_USE',
    );
  });
});

describe('stations', () => {
  it('station > in use by steps and a template > IN_USE with the numbers; unused > removed softly', async () => {
    const id = await create();
    const add = (name: string) =>
      organiser.post<{ id: string }>(`/installations/${id}/stations`, { name, kind: 'glue', places: 6 });
    const glue = await add('Glue');
    const spare = await add('Spare');
    await seedPiece(id, glue.data.id, ['hot-glue']);
    await rows(
      server,
      `INSERT INTO traveller_template (id, installation_id, name, steps, revision) VALUES ('t', ?, 'Lantern', ?, 1)`,
      id,
      JSON.stringify([{ stationId: glue.data.id }]),
    );
    const refused = await organiser.delete(`/installations/${id}/stations/${glue.data.id}`);
    expect(refused.error).toMatchObject({ code: 'IN_USE', details: { steps: 1, templates: ['Lantern'] } });
    expect(refused.error?.message).toContain('1 step is done here and it stands in Lantern');
    expect((await organiser.delete(`/installations/${id}/stations/${spare.data.id}`)).status).toBe(200);
    expect((await live(id)).records.stations).toMatchObject([
      { name: 'Glue', position: 1, removed: false },
      { name: 'Spare', position: 2, removed: true },
    ]);
    // The name of a removed one is free again.
    expect((await add('spare')).status).toBe(201);
    expect((await add('GLUE')).error?.fields).toMatchObject([{ path: 'name', code: 'taken' }]);
  });

  it('station > id of another installation > 404, nothing changes there', async () => {
    const mine = await create();
    const { glueId } = await seedInstallation(server.app);
    const path = `/installations/${mine}/stations/${glueId}`;
    expect((await organiser.put(path, { name: 'Taken over', kind: 'glue', places: 1 })).status).toBe(404);
    expect((await organiser.delete(path)).status).toBe(404);
    expect(await rows(server, 'SELECT name, removed_at FROM station WHERE id = ?', glueId)).toEqual([
      { name: 'Glue bench', removed_at: null },
    ]);
  });
});

describe('join code and projectors', () => {
  it('renewJoinCode > the old poster > JOIN_CODE_UNKNOWN like any other wrong code, told to look at the poster again', async () => {
    const { installationId: id } = await seedInstallation(server.app);
    await seedPerson(server.app, id, { accountId, duties: ['organiser'] });
    const old = (await organiser.get<JoinCodeView>(`/installations/${id}/join-code`)).data.joinCode;
    const renewed = await organiser.post<JoinCodeView>(`/installations/${id}/join-code`);
    expect(renewed.data.joinCode).not.toBe(old);
    const visitor = server.client();
    const onOld = await visitor.get(`/join/${old}`);
    const onWrong = await visitor.get('/join/ACE234');
    expect(onOld.error?.code).toBe('JOIN_CODE_UNKNOWN');
    expect(onOld.error?.message).toContain('poster again');
    expect({ ...onOld.error, requestId: '' }).toEqual({ ...onWrong.error, requestId: '' });
    expect((await visitor.get(`/join/${renewed.data.joinCode}`)).status).toBe(200);
    expect((await logOf(id)).at(-1)?.action).toBe('installation.code-renewed');
  });

  it('display > made, used, closed > the address is shown once, only hashes stored, closing ends its session', async () => {
    const { installationId: id } = await seedInstallation(server.app);
    await seedPerson(server.app, id, { accountId, duties: ['organiser'] });
    const made = await organiser.post<DisplayTokenView>(
      `/installations/${id}/displays`,
      { label: 'wall' },
      'wall-key-1',
    );
    const token = made.data.url?.split('#')[1] ?? '';
    expect(made.data.url).toMatch(/\/projector#[\w-]{43}$/);
    const everything = JSON.stringify([
      await rows(server, 'SELECT * FROM display_token'),
      await rows(server, 'SELECT * FROM idempotency'),
      await rows(server, 'SELECT * FROM day_log'),
    ]);
    expect(everything).not.toContain(token);
    const listed = await organiser.get<DisplayTokenView[]>(`/installations/${id}/displays`);
    expect(listed.data).toEqual([
      { id: made.data.id, label: 'wall', createdAt: server.clock.now(), closed: false },
    ]);
    const projector = server.client();
    const session = await projector.post<SessionView>('/display-session', { token });
    expect(session.data.principal).toEqual({ kind: 'display', installationId: id });
    await seedPerson(server.app, id, { firstName: 'Bo', email: 'bo@hall.example' });
    const seen = await live(id, projector);
    expect(seen.audience).toBe('projector');
    expect(seen.records.people.map((person) => person.details)).toEqual([null, null]);
    expect((await projector.post(`/installations/${id}/stations`, {})).status).toBe(403);
    await organiser.delete(`/installations/${id}/displays/${made.data.id}`);
    expect((await projector.get<SessionView>('/session')).data.principal).toBeNull();
    expect((await server.client().post('/display-session', { token })).error?.code).toBe('LINK_SPENT');
  });

  it('live view > at the door > the installation, its days and stations; no names but the own one', async () => {
    const { installationId: id } = await seedInstallation(server.app);
    await seedPerson(server.app, id, { firstName: 'Lena' });
    const doorId = await seedPerson(server.app, id, { firstName: 'Bo', confirmed: false });
    const state = await live(id, await signedInClient(server, doorId));
    expect(state.audience).toBe('door');
    expect(state.records.installation).toHaveLength(1);
    expect(state.records.stations).toHaveLength(2);
    expect(state.records.people).toMatchObject([{ id: doorId, name: 'Bo K', details: { ageBand: '18+' } }]);
    expect(JSON.stringify(state)).not.toContain('Lena');
  });
});
