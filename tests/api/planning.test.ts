import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import type { FrameView } from '../../shared/contracts/frames';
import type { Snapshot } from '../../shared/contracts/live';
import type { TemplateView } from '../../shared/contracts/travellers';
import { defaultTemplateSteps } from '../../shared/travellers/default-template';
import { seedInstallation, seedPerson, signedInClient } from '../support/fixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/test-server';

let server: TestServer;
let installationId: string;
let glueId: string;
let organiser: TestClient;
let base: string;

beforeEach(async () => {
  server = await startTestServer();
  ({ installationId, glueId } = await seedInstallation(server.app));
  base = `/installations/${installationId}`;
  organiser = await signedInClient(
    server,
    await seedPerson(server.app, installationId, { duties: ['organiser'] }),
  );
});
afterEach(() => server.close());

interface Made {
  id: string;
}
const icosahedron = { kind: 'shape', name: 'Icosahedron', shape: { kind: 'icosahedron', edgeMm: 200 } };
const makeFrame = async (body: object = icosahedron) =>
  (await organiser.post<Made>(`${base}/frames`, body)).data.id;
const template = () => ({ name: 'Usual', steps: defaultTemplateSteps([{ id: glueId, kind: 'glue' }]) });
const makeTemplate = async () => (await organiser.post<Made>(`${base}/templates`, template())).data.id;
const snapshot = async () => (await organiser.get<Snapshot>(`${base}/live`)).data.records;

describe('createFrame', () => {
  it('createFrame > an icosahedron by its edge > 12 joints, 30 struts, 20 faces (Euler), read back by everybody in the hall', async () => {
    const id = await makeFrame();
    const volunteer = await signedInClient(server, await seedPerson(server.app, installationId));
    const [frame] = (await volunteer.get<FrameView[]>(`${base}/frames`)).data;
    expect(frame).toMatchObject({ id, name: 'Icosahedron', subAssemblies: 0 });
    const { joints, struts, faces } = frame!.geometry;
    expect([joints.length, struts.length, faces.length]).toEqual([12, 30, 20]);
  });

  it('createFrame > an OBJ that is cut off, has NaN and a doubled strut > every fault by its line, nothing is written', async () => {
    const text = 'v 0 0 0\nv 100 0 0\nv nan 0 0\nl 1 2\nl 2 1\nv 5 5';
    const reply = await organiser.post(`${base}/frames`, {
      kind: 'obj',
      name: 'Broken',
      fileName: 'broken.obj',
      text,
    });
    expect(reply).toMatchObject({ status: 422, error: { code: 'OBJ_INVALID' } });
    const words = (reply.error?.fields ?? []).map(({ message }) => message).join('\n');
    for (const line of ['3', '5', '6']) expect(words).toContain(`ine ${line}`);
    expect((await organiser.get<FrameView[]>(`${base}/frames`)).data).toEqual([]);
  });

  it('createFrame > a shape with every measure wrong > every field problem at once', async () => {
    const reply = await organiser.post(`${base}/frames`, {
      kind: 'shape',
      name: '',
      shape: { kind: 'prism', sides: 2, baseBy: 'edge', baseMm: -5, heightMm: 0 },
    });
    expect(reply.status).toBe(400);
    const paths = (reply.error?.fields ?? []).map(({ path }) => path);
    expect(paths).toEqual(expect.arrayContaining(['name', 'shape.sides', 'shape.baseMm', 'shape.heightMm']));
  });

  it('editFrame > a frame on whose pieces work has begun > refused with IN_USE and the number, its name may change', async () => {
    const frameId = await makeFrame();
    const templateId = await makeTemplate();
    await organiser.post(`${base}/sub-assemblies`, {
      frameId,
      templateId,
      letter: 'V',
      name: 'Gem',
      quantity: 2,
    });
    const { steps } = await snapshot();
    const cut = steps.find((step) => step.state === 'ready')!;
    const volunteer = await signedInClient(server, await seedPerson(server.app, installationId));
    await volunteer.post(`${base}/steps/${cut.id}/claim`);
    const bigger = { ...icosahedron, shape: { kind: 'icosahedron', edgeMm: 300 } };
    expect(await organiser.put(`${base}/frames/${frameId}`, bigger)).toMatchObject({
      status: 409,
      error: { code: 'IN_USE', details: { begun: 1 } },
    });
    expect(await organiser.put(`${base}/frames/${frameId}`, { ...icosahedron, name: 'Gem' })).toMatchObject({
      status: 200,
    });
    expect(await organiser.delete(`${base}/frames/${frameId}`)).toMatchObject({
      error: { code: 'IN_USE', details: { pieces: 2 } },
    });
  });
});

describe('createSubAssemblies', () => {
  it('createSubAssemblies > 3, then 2 more of the same letter > codes go on, a traveller each, minutes from cuts and joints', async () => {
    const [frameId, templateId] = [await makeFrame(), await makeTemplate()];
    const make = (quantity: number) =>
      organiser.post<{ codes: string[] }>(`${base}/sub-assemblies`, {
        frameId,
        templateId,
        letter: 'v',
        name: 'Gem',
        quantity,
      });
    expect((await make(3)).data.codes).toEqual(['V-01', 'V-02', 'V-03']);
    expect((await make(2)).data.codes).toEqual(['V-04', 'V-05']);
    const { subAssemblies, steps } = await snapshot();
    expect(subAssemblies).toHaveLength(5);
    const first = subAssemblies.find(({ code }) => code === 'V-01')!;
    const own = steps
      .filter((step) => step.subAssemblyId === first.id)
      .sort((a, b) => a.position - b.position);
    expect(own.map(({ state }) => state)).toEqual(['ready', ...Array.from({ length: 7 }, () => 'waiting')]);
    const cut = template().steps[0]!;
    // 30 struts are 30 cuts, 12 joints; by hand: 4 min and 0.6 min a cut.
    expect(own[0]?.plannedSeconds).toBe(Math.round((cut.minutes.fixed + 30 * cut.minutes.perCut) * 60));
  });

  it('createSubAssemblies > a letter that is misheard, nothing chosen, none wanted > every field problem at once', async () => {
    const reply = await organiser.post(`${base}/sub-assemblies`, {
      frameId: '',
      templateId: '',
      letter: 'B',
      name: '',
      quantity: 0,
    });
    const paths = (reply.error?.fields ?? []).map(({ path }) => path).sort();
    expect(paths).toEqual(['frameId', 'letter', 'name', 'quantity', 'templateId']);
  });

  it('removeSubAssembly > untouched, and worked on > the first goes with its steps, the second stays with IN_USE', async () => {
    const [frameId, templateId] = [await makeFrame(), await makeTemplate()];
    const { data } = await organiser.post<{ ids: [string, string] }>(`${base}/sub-assemblies`, {
      frameId,
      templateId,
      letter: 'V',
      name: 'Gem',
      quantity: 2,
    });
    const [gone, used] = data.ids;
    const cut = (await snapshot()).steps.find(
      (step) => step.subAssemblyId === used && step.state === 'ready',
    )!;
    const volunteer = await signedInClient(server, await seedPerson(server.app, installationId));
    await volunteer.post(`${base}/steps/${cut.id}/claim`);
    expect(await organiser.delete(`${base}/sub-assemblies/${gone}`)).toMatchObject({ status: 200 });
    expect(await organiser.delete(`${base}/sub-assemblies/${used}`)).toMatchObject({
      status: 409,
      error: { code: 'IN_USE' },
    });
    const records = await snapshot();
    expect(records.subAssemblies.filter(({ removed }) => !removed).map(({ id }) => id)).toEqual([used]);
    expect(records.steps.filter(({ removed }) => removed)).toHaveLength(8);
  });
});

describe('saveTemplate', () => {
  it('saveTemplate > from a page older than the template > refused with STALE_PAGE, the newer one stays', async () => {
    const id = await makeTemplate();
    const [known] = (await organiser.get<TemplateView[]>(`${base}/templates`)).data;
    const edit = (name: string, revision: number) =>
      organiser.put(`${base}/templates/${id}`, { ...template(), name, revision });
    expect(await edit('First', known!.revision)).toMatchObject({ status: 200 });
    expect(await edit('Second', known!.revision)).toMatchObject({
      status: 409,
      error: { code: 'STALE_PAGE' },
    });
    expect((await organiser.get<TemplateView[]>(`${base}/templates`)).data.map(({ name }) => name)).toEqual([
      'First',
    ]);
  });

  it('saveTemplate > a station that is gone, crew upside down > told at the step that is wrong', async () => {
    const wrong = template();
    wrong.steps[1]!.stationId = 'gone';
    expect(await organiser.post(`${base}/templates`, wrong)).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'steps.1.stationId' }] },
    });
    const upside = template();
    Object.assign(upside.steps[2]!, { crewMin: 3, crewMax: 1 });
    expect(await organiser.post(`${base}/templates`, upside)).toMatchObject({
      status: 400,
      error: { fields: [{ path: 'steps.2.crewMax' }] },
    });
  });
});
