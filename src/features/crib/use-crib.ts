import type {
  BuildDayRecord,
  CheckoutRecord,
  PersonRecord,
  ToolRecord,
} from '../../../shared/contracts/live';
import { useLiveMap } from '../../lib/live';
import { useServerNow } from '../../lib/server-clock';
import { buildDayNow } from './back-by';

/** One tool that is out. */
export interface ToolOut {
  checkout: CheckoutRecord;
  tool: ToolRecord;
  late: boolean;
}

export interface Crib {
  /** By number, removed ones left out. */
  tools: readonly ToolRecord[];
  /** Soonest back first. */
  out: readonly ToolOut[];
  /** The open checkout of a tool. */
  outOf: ReadonlyMap<string, CheckoutRecord>;
  tagged: readonly ToolRecord[];
  people: ReadonlyMap<string, PersonRecord>;
  nameOf: (personId: string) => string;
  stationName: (id: string) => string;
  day: BuildDayRecord | undefined;
  now: number;
  zone: string;
}

const byNumber = new Intl.Collator('en', { numeric: true });

/** The crib as it stands: what is out, what is in, what is not to be used. */
export function useCrib(installationId: string): Crib {
  const allTools = useLiveMap(installationId, 'tools');
  const checkouts = useLiveMap(installationId, 'checkouts');
  const people = useLiveMap(installationId, 'people');
  const stations = useLiveMap(installationId, 'stations');
  const days = useLiveMap(installationId, 'buildDays');
  const [installation] = useLiveMap(installationId, 'installation').values();
  const now = useServerNow(15_000);
  const zone = installation?.timeZone ?? 'UTC';
  const open = [...checkouts.values()].filter((checkout) => checkout.backAt === null);
  const tools = [...allTools.values()]
    .filter((tool) => !tool.removed)
    .sort((a, b) => byNumber.compare(a.number, b.number));
  const out = open
    .flatMap((checkout): ToolOut[] => {
      const tool = allTools.get(checkout.toolId);
      return tool ? [{ checkout, tool, late: checkout.backBy < now }] : [];
    })
    .sort((a, b) => a.checkout.backBy - b.checkout.backBy || byNumber.compare(a.tool.number, b.tool.number));
  return {
    tools,
    out,
    outOf: new Map(open.map((checkout) => [checkout.toolId, checkout])),
    tagged: tools.filter((tool) => tool.tag !== null),
    people,
    nameOf: (id) => people.get(id)?.name ?? 'somebody',
    stationName: (id) => stations.get(id)?.name ?? '',
    day: buildDayNow(days.values(), now, zone),
    now,
    zone,
  };
}
