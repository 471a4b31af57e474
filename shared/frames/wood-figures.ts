import { strutLengths } from './frame';
import type { Frame } from './frame';
import { boxOf } from './vector';
import type { Vector } from './vector';
import { stickKg, stickSurface } from './wood';

/** What a frame weighs and takes up as wood. Lengths are from centre to centre of its joints. */
export type WoodFigures = {
  kg: number;
  /** Mass of each strut, in the frame's order. */
  strutKg: number[];
  /** Round about, without the ends, square metres. */
  surfaceM2: number;
  /** Of the struts as even sticks, mm; the middle of the box where there is no wood. */
  centreOfMass: Vector;
  /** Outside of the wood: least and greatest coordinates of the joints, wider by half a diameter. */
  box: { least: Vector; most: Vector; sizeMm: Vector };
};

/**
 * Mass, surface, centre of mass and bounding box of a frame made of round sticks.
 * @param frame struts that name existing joints, mm
 * @param diameterMm diameter of the sticks, mm, above 0
 * @param density kg per cubic metre, see `densityOf`
 * @returns figures of the bare wood: glue and paint come on top, and joints count once for every strut that reaches them, so the
 *   mass is a little too high rather than too low
 * Source: centre of mass of even rods, each at its middle.
 */
export function woodFigures(frame: Frame, diameterMm: number, density: number): WoodFigures {
  const lengths = strutLengths(frame).map((length) => (Number.isFinite(length) ? length : 0));
  const strutKg = lengths.map((length) => stickKg(length, diameterMm, density));
  const kg = strutKg.reduce((sum, one) => sum + one, 0);
  const { least, most } = boxOf(frame.joints);
  const axis = (key: 'x' | 'y' | 'z'): number => {
    if (!(kg > 0)) return (least[key] + most[key]) / 2;
    const moment = frame.struts.reduce((sum, [a, b], strut) => {
      const [from, to] = [frame.joints[a], frame.joints[b]];
      return from && to ? sum + (strutKg[strut]! * (from[key] + to[key])) / 2 : sum;
    }, 0);
    return moment / kg;
  };
  const half = frame.struts.length > 0 ? diameterMm / 2 : 0;
  const outer = {
    least: { x: least.x - half, y: least.y - half, z: least.z - half },
    most: { x: most.x + half, y: most.y + half, z: most.z + half },
  };
  return {
    kg,
    strutKg,
    surfaceM2: stickSurface(
      lengths.reduce((sum, length) => sum + length, 0),
      diameterMm,
    ),
    centreOfMass: { x: axis('x'), y: axis('y'), z: axis('z') },
    box: {
      ...outer,
      sizeMm: {
        x: outer.most.x - outer.least.x,
        y: outer.most.y - outer.least.y,
        z: outer.most.z - outer.least.z,
      },
    },
  };
}
