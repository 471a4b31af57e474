/** Struts of one plane: per joint its neighbours there and the strut that leads to each. */
export type PlaneGraph = Map<number, { joint: number; strut: number }[]>;

/** How much a search for rings may find and try. */
export type CycleLimits = { mostRings: number; mostSteps: number };

/** Takes away what hangs on by one strut only: it stands in no ring. */
function withoutTails(graph: PlaneGraph): PlaneGraph {
  const kept = new Map([...graph].map(([joint, list]) => [joint, [...list]]));
  const loose = [...kept].filter(([, list]) => list.length < 2).map(([joint]) => joint);
  for (let joint = loose.pop(); joint !== undefined; joint = loose.pop()) {
    for (const { joint: other } of kept.get(joint) ?? []) {
      const rest = (kept.get(other) ?? []).filter((near) => near.joint !== joint);
      kept.set(other, rest);
      if (rest.length === 1) loose.push(other);
    }
    kept.delete(joint);
  }
  return kept;
}

/** Fewest struts from a joint to all that can be reached through joints with a higher index. */
function stepsFrom(graph: PlaneGraph, start: number): Map<number, number> {
  const steps = new Map([[start, 0]]);
  const queue = [start];
  for (const joint of queue)
    for (const { joint: next } of graph.get(joint)!)
      if (next > start && !steps.has(next)) {
        steps.set(next, steps.get(joint)! + 1);
        queue.push(next);
      }
  return steps;
}

/**
 * The simple cycles of the struts of one plane, the shortest first.
 * @param graph neighbours of each joint
 * @param limits stop after so many rings, or after so many joints looked at
 * @returns each cycle once, from its lowest joint towards the lower of its two neighbours; `complete` false when a limit stopped it
 * Source: own; depth-first search for each length, cut off where the way back is too long.
 */
export function planeCycles(
  graph: PlaneGraph,
  limits: CycleLimits,
): { cycles: { joints: number[]; struts: number[] }[]; complete: boolean } {
  const core = withoutTails(graph);
  const starts = [...core.keys()].sort((a, b) => a - b);
  const back = new Map(starts.map((start) => [start, stepsFrom(core, start)]));
  const cycles: { joints: number[]; struts: number[] }[] = [];
  let steps = 0;
  const stopped = (): boolean => steps > limits.mostSteps || cycles.length >= limits.mostRings;

  const walk = (path: number[], struts: number[], on: Set<number>, length: number): void => {
    const start = path[0]!;
    const here = path[path.length - 1]!;
    const ways = back.get(start)!;
    for (const { joint, strut } of core.get(here)!) {
      if (stopped()) return;
      if (joint === start && path.length === length && path[1]! < here)
        cycles.push({ joints: [...path], struts: [...struts, strut] });
      const wayBack = ways.get(joint);
      if (joint <= start || on.has(joint) || wayBack === undefined || path.length + wayBack > length)
        continue;
      if (path.length === length) continue;
      steps++;
      path.push(joint);
      struts.push(strut);
      on.add(joint);
      walk(path, struts, on, length);
      path.pop();
      struts.pop();
      on.delete(joint);
    }
  };

  for (let length = 3; length <= core.size && !stopped(); length++)
    for (const start of starts) {
      if (stopped()) break;
      walk([start], [], new Set([start]), length);
    }
  return { cycles, complete: !stopped() };
}
