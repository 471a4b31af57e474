import type { Hazard } from '../safety/hazards';
import type { Minutes } from './minutes';
import type { Clocks, Operation } from './step';

/** A step of the usual order, before it has a place. */
interface UsualStep {
  operation: Operation;
  name: string;
  /** Kinds of station where it is done, best first. */
  at: readonly string[];
  hazards: Hazard[];
  toolKinds: string[];
  crewMin: number;
  crewMax: number;
  minutes: Minutes;
  clocks: Clocks | null;
  needsCheck: boolean;
}

const MINUTE = 60;

// Minutes, crews and clocks are common practice, no source: every hall measures its own on a test piece and edits them.
const USUAL: readonly UsualStep[] = [
  {
    operation: 'cut',
    name: 'cut',
    at: ['saw', 'bench'],
    hazards: [],
    toolKinds: ['mitre box and saw'],
    crewMin: 1,
    crewMax: 1,
    minutes: { fixed: 4, perCut: 0.6, perJoint: 0 },
    clocks: null,
    needsCheck: false,
  },
  {
    operation: 'lay out',
    name: 'lay out',
    at: ['bench'],
    hazards: [],
    toolKinds: [],
    crewMin: 1,
    crewMax: 2,
    minutes: { fixed: 4, perCut: 0.2, perJoint: 0.3 },
    clocks: null,
    needsCheck: false,
  },
  {
    operation: 'tack',
    name: 'tack',
    at: ['glue', 'bench'],
    hazards: ['hot-glue'],
    toolKinds: ['hot-glue gun'],
    crewMin: 1,
    crewMax: 1,
    minutes: { fixed: 3, perCut: 0, perJoint: 0.7 },
    clocks: null,
    needsCheck: false,
  },
  {
    operation: 'raise',
    name: 'raise',
    at: ['glue', 'bench'],
    hazards: ['hot-glue'],
    toolKinds: ['hot-glue gun'],
    crewMin: 2,
    crewMax: 3,
    minutes: { fixed: 5, perCut: 0, perJoint: 0.8 },
    clocks: null,
    needsCheck: false,
  },
  {
    operation: 'glue out',
    name: 'glue out',
    at: ['glue', 'bench'],
    hazards: ['hot-glue'],
    toolKinds: ['hot-glue gun'],
    crewMin: 1,
    crewMax: 2,
    minutes: { fixed: 3, perCut: 0, perJoint: 1 },
    clocks: null,
    needsCheck: true,
  },
  {
    operation: 'clean',
    name: 'clean',
    at: ['bench'],
    hazards: [],
    toolKinds: [],
    crewMin: 1,
    crewMax: 2,
    minutes: { fixed: 3, perCut: 0, perJoint: 0.5 },
    clocks: null,
    needsCheck: false,
  },
  {
    operation: 'coat',
    name: 'coat',
    at: ['paint bay', 'bench'],
    hazards: [],
    toolKinds: ['brush'],
    crewMin: 1,
    crewMax: 2,
    minutes: { fixed: 4, perCut: 0.4, perJoint: 0 },
    clocks: {
      touchDry: 35 * MINUTE,
      recoatFrom: 60 * MINUTE,
      handleFrom: 45 * MINUTE,
      hangFrom: 60 * MINUTE,
    },
    needsCheck: true,
  },
  {
    operation: 'hang',
    name: 'hang',
    at: ['hanging zone', 'other', 'bench'],
    hazards: [],
    toolKinds: ['step ladder'],
    crewMin: 2,
    crewMax: 2,
    minutes: { fixed: 10, perCut: 0, perJoint: 0 },
    clocks: null,
    needsCheck: true,
  },
];

/** A step of a template, as an organiser edits it. */
export type DefaultStep = Omit<UsualStep, 'at'> & { stationId: string };

/**
 * The usual order of a painted, hung dowel piece, each step at the first station of the kind it is done at: cut, lay out,
 * tack, raise, glue out, clean, coat, hang.
 * @param stations of the installation, in their order; with none the steps have no station and the editor asks for one
 * @returns steps in order, to be edited
 * @source common practice, no source
 */
export function defaultTemplateSteps(stations: readonly { id: string; kind: string }[]): DefaultStep[] {
  return USUAL.map(({ at, ...step }) => ({ ...step, stationId: stationFor(stations, at) }));
}

function stationFor(stations: readonly { id: string; kind: string }[], kinds: readonly string[]): string {
  for (const kind of kinds) {
    const found = stations.find((station) => station.kind === kind);
    if (found) return found.id;
  }
  return stations[0]?.id ?? '';
}
