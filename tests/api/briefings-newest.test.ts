import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { WholeVersionView } from '../../shared/contracts/safety';
import { HOT_GLUE_BODY } from '../../shared/safety';
import { openHall, type Hall } from '../support/fixtures-safety';

let hall: Hall;
beforeEach(async () => {
  hall = await openHall();
});
afterEach(() => hall.server.close());

const read = (client: Hall['lead'], key = 'hot-glue') =>
  client.get<WholeVersionView>(`${hall.base}/briefings/${key}/versions`);

describe('the newest version whole', () => {
  it('readNewestVersion > a safety lead > the text with its right answers; after a change > the new one', async () => {
    const first = await read(hall.lead);
    expect([first.status, first.data.version]).toEqual([200, 1]);
    expect(first.data.body).toEqual(HOT_GLUE_BODY);
    const from = hall.server.clock.now() + 3_600_000;
    await hall.lead.post(`${hall.base}/briefings/hot-glue/versions`, {
      kind: 'change',
      body: { ...HOT_GLUE_BODY, closing: 'Ask before you begin.' },
      whatChanged: 'The last line.',
      effectiveFrom: from,
      basedOn: 1,
    });
    const next = await read(hall.lead);
    expect(next.data).toMatchObject({ version: 2, effectiveFrom: from });
    expect(next.data.body.closing).toBe('Ask before you begin.');
  });

  it('readNewestVersion > a volunteer or an organiser > NOT_ALLOWED, no right answer leaves the server; unknown key > NOT_FOUND', async () => {
    for (const client of [hall.ines, hall.organiser]) {
      const reply = await read(client);
      expect([reply.status, reply.error?.code]).toEqual([403, 'NOT_ALLOWED']);
      expect(reply.text).not.toContain('"right"');
    }
    expect((await read(hall.lead, 'no-such')).error?.code).toBe('NOT_FOUND');
  });
});
