import type { TemplateStep } from '../../../shared/contracts/travellers';
import { defaultTemplateSteps } from '../../../shared/travellers/default-template';
import type { DemoClient } from './demo-client';
import { BUILD_DAY, FRAMES, PLACEMENTS, INSTALLATION, PIECES, STATIONS } from './demo-scenario';

interface Made {
  id: string;
}

/**
 * The organiser's weeks before: installation, day, stations, frames, template, pieces.
 * @returns the installation's id
 */
export async function planHall(organiser: DemoClient): Promise<string> {
  const { id } = await organiser.post<Made>('/installations', INSTALLATION);
  const path = (rest: string) => `/installations/${id}${rest}`;
  await organiser.post(path('/build-days'), BUILD_DAY);
  const stations: { id: string; name: string; kind: string }[] = [];
  for (const station of STATIONS) {
    stations.push({
      ...(await organiser.post<Made>(path('/stations'), station)),
      name: station.name,
      kind: station.kind,
    });
  }
  const frames = new Map<string, string>();
  for (const { name, shape } of FRAMES) {
    frames.set(name, (await organiser.post<Made>(path('/frames'), { kind: 'shape', name, shape })).id);
  }
  for (const { frame, ...placement } of PLACEMENTS) {
    await organiser.post(path('/placements'), { ...placement, frameId: frames.get(frame) ?? '' });
  }
  const steps: TemplateStep[] = defaultTemplateSteps(stations);
  const template = await organiser.post<Made>(path('/templates'), { name: 'Lattice and lanterns', steps });
  for (const { frame, letter, name, quantity } of PIECES) {
    await organiser.post(path('/sub-assemblies'), {
      frameId: frames.get(frame) ?? '',
      templateId: template.id,
      letter,
      name,
      quantity,
    });
  }
  return id;
}
