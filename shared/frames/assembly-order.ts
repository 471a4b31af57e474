import { edgeKey, ringEdges } from './edge-key';
import type { Frame } from './frame';

/** Strut indexes of a face in the order round it, beginning right after a joint that is already built. */
function ringFrom(
  face: readonly number[],
  strutOf: Map<number, number>,
  built: ReadonlySet<number>,
): number[] {
  const start = Math.max(
    0,
    face.findIndex((joint) => built.has(joint)),
  );
  const turned = [...face.slice(start), ...face.slice(0, start)];
  return ringEdges(turned).flatMap(([a, b]) => strutOf.get(edgeKey(a, b)) ?? []);
}

/**
 * The order in which a frame is glued together: a flat on the bench first, then raised face by face, growing from joint 1.
 * @param frame a valid frame
 * @returns every strut index (from 0) once. It begins with the ring of joint 1's largest face (the lowest in the list among equals);
 *   then the face that needs fewest further struts, and struts without a face where no face is left. Each strut touches an earlier one,
 *   unless the frame is in several parts; then the part of the lowest joint comes first.
 * Source: own.
 */
export function assemblyOrder(frame: Frame): number[] {
  const strutOf = new Map(frame.struts.map(([a, b], strut) => [edgeKey(a, b), strut]));
  const facesAt: number[][] = frame.joints.map(() => []);
  const strutsAt: number[][] = frame.joints.map(() => []);
  frame.faces.forEach((face, index) => face.forEach((joint) => facesAt[joint]!.push(index)));
  frame.struts.forEach(([a, b], strut) => {
    strutsAt[a]!.push(strut);
    strutsAt[b]!.push(strut);
  });
  const missing = frame.faces.map((face) => new Set(ringFrom(face, strutOf, new Set())));
  const facesOf: number[][] = frame.struts.map(() => []);
  missing.forEach((struts, face) => struts.forEach((strut) => facesOf[strut]!.push(face)));

  const order: number[] = [];
  const laid = new Set<number>();
  const built = new Set<number>();
  const openFaces = new Set<number>();
  const openStruts = new Set<number>();

  const reach = (joint: number): void => {
    if (built.has(joint)) return;
    built.add(joint);
    for (const face of facesAt[joint]!) if (missing[face]!.size > 0) openFaces.add(face);
    for (const strut of strutsAt[joint]!) if (!laid.has(strut)) openStruts.add(strut);
  };
  const lay = (strut: number): void => {
    if (laid.has(strut)) return;
    laid.add(strut);
    order.push(strut);
    openStruts.delete(strut);
    for (const face of facesOf[strut]!) {
      missing[face]!.delete(strut);
      if (missing[face]!.size === 0) openFaces.delete(face);
    }
    for (const joint of frame.struts[strut]!) reach(joint);
  };
  const layFace = (face: number): void => ringFrom(frame.faces[face]!, strutOf, built).forEach(lay);

  const nextFace = (): number | undefined => {
    let best: number | undefined;
    for (const face of openFaces)
      if (
        best === undefined ||
        missing[face]!.size < missing[best]!.size ||
        (missing[face]!.size === missing[best]!.size && face < best)
      )
        best = face;
    return best;
  };
  const nextStrut = (): number | undefined => {
    let best: number | undefined;
    let bestEnds = 0;
    for (const strut of openStruts) {
      const ends = frame.struts[strut]!.filter((joint) => built.has(joint)).length;
      if (best === undefined || ends > bestEnds || (ends === bestEnds && strut < best))
        [best, bestEnds] = [strut, ends];
    }
    return best;
  };

  for (let joint = 0; joint < frame.joints.length; joint++) {
    if (built.has(joint) || strutsAt[joint]!.length === 0) continue;
    reach(joint);
    const flats = facesAt[joint]!.filter((face) => missing[face]!.size > 0);
    const [first, ...others] = flats;
    if (first !== undefined)
      layFace(
        others.reduce(
          (best, face) => (frame.faces[face]!.length > frame.faces[best]!.length ? face : best),
          first,
        ),
      );
    for (;;) {
      const face = nextFace();
      if (face !== undefined) {
        layFace(face);
        continue;
      }
      const strut = nextStrut();
      if (strut === undefined) break;
      lay(strut);
    }
  }
  return order;
}
