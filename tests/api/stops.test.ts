import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { Snapshot, StopRecord } from '../../shared/contracts/live';
import { activeStops } from '../../server/modules/safety';
import { stopCovers } from '../../shared/safety';
import { inScope, seedPerson, signedInClient } from '../support/fixtures';
import { logged, openHall, stored, type Hall } from '../support/fixtures-safety';
import { TEST_NOW, type TestClient } from '../support/test-server';

let hall: Hall;
let stops: string;

beforeEach(async () => {
  hall = await openHall();
  stops = `${hall.base}/stops`;
});
afterEach(() => hall.server.close());

const raise = (client: TestClient, wish: object) =>
  client.post<{ stopId: string }>(stops, { reason: 'smoke', ...wish });
const active = () =>
  inScope(hall.server.app, hall.installationId, ({ manager }) => activeStops(manager, hall.installationId));
const stopsOf = async (client: TestClient): Promise<StopRecord[]> =>
  (await client.get<Snapshot>(`${hall.base}/live`)).data.records.stops;

describe('raising a stop', () => {
  it('raiseStop > by a volunteer > stored, logged, covers the station of its area, seen by the volunteer', async () => {
    const reply = await raise(hall.ines, { scope: 'area', stationId: hall.glueId });
    const { stopId } = reply.data;
    expect(await active()).toEqual([
      { scope: 'area', stationId: hall.glueId, stopId, raisedBy: hall.inesId, raisedAt: TEST_NOW },
    ]);
    const [stop] = await active();
    if (!stop) throw new Error('no stop');
    expect(stopCovers(stop, { stationId: hall.glueId, hazards: ['hot-glue'] })).toBe(true);
    expect(stopCovers(stop, { stationId: hall.paintId, hazards: ['hot-glue'] })).toBe(false);
    expect(await logged(hall, 'stop.raised')).toMatchObject([
      { actor: `person:${hall.inesId}`, subject: { stopId, scope: 'area', stationId: hall.glueId } },
    ]);
    expect(await stopsOf(hall.lead)).toMatchObject([{ id: stopId, reason: 'smoke', seenBy: [hall.inesId] }]);
  });

  it('raiseStop > the same one is up > STOP_ALREADY_RAISED with who and since when, hall time; another scope is free', async () => {
    const { stopId } = (await raise(hall.ines, { scope: 'hot-tools' })).data;
    const again = await raise(hall.lead, { scope: 'hot-tools' });
    expect(again.error).toMatchObject({
      code: 'STOP_ALREADY_RAISED',
      details: { stopId, raisedBy: hall.inesId, raisedAt: TEST_NOW },
    });
    expect(again.error?.message).toContain('Ines K. has stopped all hot tools since 10:00');
    expect((await raise(hall.lead, { scope: 'everything' })).status).toBe(200);
    expect((await raise(hall.lead, { scope: 'area', stationId: hall.glueId })).status).toBe(200);
    expect((await raise(hall.lead, { scope: 'area', stationId: hall.paintId })).status).toBe(200);
    expect(await active()).toHaveLength(4);
  });

  it('raiseStop > by somebody the desk has not confirmed > refused, no stop', async () => {
    const doorId = await seedPerson(hall.server.app, hall.installationId, { confirmed: false });
    const door = await signedInClient(hall.server, doorId);
    expect((await raise(door, { scope: 'everything' })).error?.code).toBe('PERSON_NOT_CONFIRMED');
    expect(await active()).toEqual([]);
  });

  it.each([
    ['no reason', { scope: 'everything', reason: ' ' }, 'reason'],
    ['an area without a station', { scope: 'area' }, 'stationId'],
    ['a station that is not there', { scope: 'area', stationId: 'nowhere' }, 'stationId'],
  ])('raiseStop > %s > named beside its field', async (_what, wish, path) => {
    const reply = await raise(hall.ines, wish);
    expect([reply.status, reply.error?.fields?.[0]?.path]).toEqual([400, path]);
  });

  it('raiseStop > the same key twice > one stop', async () => {
    const body = { scope: 'everything', reason: 'smoke' };
    const first = await hall.ines.post(stops, body, 'a-key-of-the-phone');
    const second = await hall.ines.post(stops, body, 'a-key-of-the-phone');
    expect(second.data).toEqual(first.data);
    expect(await active()).toHaveLength(1);
  });
});

describe('a raised stop', () => {
  it('seeStop > by people at the door and on site, one twice > each counted once, every audience sees it', async () => {
    const { stopId } = (await raise(hall.ines, { scope: 'everything' })).data;
    const doorId = await seedPerson(hall.server.app, hall.installationId, { confirmed: false });
    const door = await signedInClient(hall.server, doorId);
    const seen = `${stops}/${stopId}/seen`;
    expect((await door.post(seen)).data).toEqual({ stopId, lifted: false });
    await hall.lead.post(seen);
    await hall.lead.post(seen);
    const seenBy = [hall.inesId, doorId, hall.leadId];
    expect((await stopsOf(door))[0]?.seenBy).toEqual(seenBy);
    expect((await stopsOf(hall.organiser))[0]?.seenBy).toEqual(seenBy);
    expect(await logged(hall, 'stop.seen')).toHaveLength(2);
    expect((await door.get(`${hall.base}/live`)).text).not.toContain('Lena');
  });

  it('live record > a projector > shows the stop', async () => {
    await raise(hall.ines, { scope: 'hot-tools' });
    await stored(
      hall,
      `INSERT INTO display_token (installation_id, id, label, token_hash, created_at) VALUES (?, 'beamer', 'hall', 'x', 0)`,
    );
    const projector = await signedInClient(hall.server, 'display:beamer');
    expect(await stopsOf(projector)).toMatchObject([{ scope: 'hot-tools', liftedAt: null }]);
    expect((await raise(projector, { scope: 'everything' })).error?.code).toBe('NOT_ALLOWED');
  });

  it('liftStop > by a safety lead with a note > lifted; a second time says who did', async () => {
    const { stopId } = (await raise(hall.ines, { scope: 'hot-tools' })).data;
    const lift = `${stops}/${stopId}/lift`;
    expect((await hall.organiser.post(lift, { note: 'all clear' })).error?.code).toBe('NOT_ALLOWED');
    expect((await hall.lead.post(lift, { note: '' })).error?.fields?.[0]?.path).toBe('note');
    expect(await active()).toHaveLength(1);
    hall.server.clock.advance(300_000);
    expect((await hall.lead.post(lift, { note: 'a smouldering rag, taken outside' })).status).toBe(200);
    expect(await active()).toEqual([]);
    expect(await stopsOf(hall.ines)).toMatchObject([
      {
        liftedBy: hall.leadId,
        liftedAt: TEST_NOW + 300_000,
        liftNote: 'a smouldering rag, taken outside',
      },
    ]);
    const again = await hall.second.post(lift, { note: 'all clear' });
    expect(again.error?.code).toBe('STOP_LIFTED');
    expect(again.error?.message).toContain('Lena M. lifted this stop at 10:05');
    expect((await hall.ines.post(`${stops}/${stopId}/seen`)).data).toEqual({ stopId, lifted: true });
    expect(await logged(hall, 'stop.lifted')).toMatchObject([{ subject: { stopId } }]);
    expect((await raise(hall.ines, { scope: 'hot-tools' })).status).toBe(200);
  });
});
