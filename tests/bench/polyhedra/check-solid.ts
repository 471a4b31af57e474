import {
  dihedralAngles,
  formatFrameCsv,
  formatObj,
  frameFigures,
  parseFrameCsv,
  parseObj,
  strutLengths,
  validateFrame,
  type Frame,
} from '../../../shared/frames';

/** A solid with edges of 1 as the reference folder has it. `dihedrals` as `3-3:138.19(x5) 3-5:153.94`, degrees to two places. */
export type Solid = {
  vertices: [number, number, number][];
  edges: [number, number][];
  faces: number[][];
  dihedrals: string;
};

/** What is published of it in a table; `faces` as `5x3 11x5`. */
export type Published = { V: number; E: number; F: number; faces: string };

/** Coordinates written to twelve places: half of the last one at both ends of an edge, along all three axes at worst. */
const MOST_EDGE_ERROR = Math.sqrt(3) * 1e-12;

/** The solid as another program would write it. */
const objOf = ({ vertices, edges, faces }: Solid): string =>
  [
    ...vertices.map((place) => `v ${place.join(' ')}`),
    ...edges.map(([a, b]) => `l ${a + 1} ${b + 1}`),
    ...faces.map((face) => `f ${face.map((joint) => joint + 1).join(' ')}`),
  ].join('\n');

const frameOf = ({ vertices, edges, faces }: Solid): Frame => ({
  joints: vertices.map(([x, y, z]) => ({ x, y, z })),
  struts: edges,
  faces,
});

/** Equal to the last digit; a zero has no sign. */
const same = (a: Frame, b: Frame): boolean => JSON.stringify(a) === JSON.stringify(b);

/** An angle between two faces, named by their sides. */
type Angle = { sides: string; degrees: number };

const inOrder = (angles: Angle[]): Angle[] =>
  angles.sort((a, b) => a.sides.localeCompare(b.sides, 'en') || a.degrees - b.degrees);

function anglesOf(frame: Frame): Angle[] {
  return inOrder(
    dihedralAngles(frame).map(({ faces, degrees }) => ({
      sides: faces
        .map((face) => frame.faces[face]!.length)
        .sort((a, b) => a - b)
        .join('-'),
      degrees,
    })),
  );
}

function publishedAngles(text: string): Angle[] {
  return inOrder(
    text.split(' ').flatMap((entry) => {
      const [, sides = entry, degrees = 'NaN', count = '1'] = /^(.*):(.*?)(?:\(x(\d+)\))?$/.exec(entry) ?? [];
      return Array.from({ length: Number(count) }, () => ({ sides, degrees: Number(degrees) }));
    }),
  );
}

/** Half of the last place, and a little for the rounding of an angle that lies between two places. */
const MOST_ANGLE_ERROR = 0.005 + 1e-6;

/** The first angle that is another one than is published. */
function firstOther(found: readonly Angle[], wanted: readonly Angle[]): string | null {
  if (found.length !== wanted.length) return `${found.length} of them; published ${wanted.length}`;
  for (const [at, { sides, degrees }] of found.entries()) {
    const other = wanted[at]!;
    // Written so that a number that is none differs.
    if (sides !== other.sides || !(Math.abs(degrees - other.degrees) <= MOST_ANGLE_ERROR))
      return `${sides}:${degrees.toFixed(4)}; published ${other.sides}:${other.degrees}`;
  }
  return null;
}

const sidesOf = ({ faces }: Frame): string => {
  const counts = new Map<number, number>();
  for (const face of faces) counts.set(face.length, (counts.get(face.length) ?? 0) + 1);
  return [...counts]
    .sort(([a], [b]) => a - b)
    .map(([sides, count]) => `${count}x${sides}`)
    .join(' ');
};

/** In and out through one format: the frame read, or what went wrong. */
function throughFormat(
  format: 'OBJ' | 'CSV',
  text: string,
  wanted: Frame,
  wrong: (what: string) => void,
): Frame | null {
  const read = format === 'OBJ' ? parseObj : parseFrameCsv;
  const write = format === 'OBJ' ? formatObj : formatFrameCsv;
  const first = read(text);
  if (!first.ok) {
    wrong(`${format} was refused: ${first.refusal.map(({ message }) => message).join(' ')}`);
    return null;
  }
  const { frame, notes } = first.value;
  if (notes.length > 0 && !notes.every(({ message }) => message.startsWith('The longest strut is')))
    wrong(`${format} came in with something set right: ${notes.map(({ message }) => message).join(' ')}`);
  if (!same(frame, wanted)) wrong(`${format} came in changed`);
  const written = write(frame);
  const second = read(written);
  if (!second.ok || !same(second.value.frame, frame) || write(second.value.frame) !== written)
    wrong(`${format} went out changed`);
  return frame;
}

/**
 * What is wrong with a solid that goes in and out through OBJ and CSV, against what is published of it.
 * @param published its row of the table; null where the table has none, then Euler's formula stands in
 * @returns nothing when counts, unit edges and dihedral angles agree and every digit of the coordinates is kept
 */
export function checkSolid(solid: Solid, published: Published | null): string[] {
  const found: string[] = [];
  const wrong = (what: string) => found.push(what);
  const wanted = frameOf(solid);
  const read = throughFormat('OBJ', objOf(solid), wanted, wrong);
  throughFormat('CSV', formatFrameCsv(wanted), wanted, wrong);
  if (!read) return found;
  const problems = validateFrame(read);
  if (problems.length > 0) wrong(`not valid: ${problems.map(({ message }) => message).join(' ')}`);
  const counts = [read.joints.length, read.struts.length, read.faces.length];
  if (counts[0]! - counts[1]! + counts[2]! !== 2)
    wrong(`joints - struts + faces is not 2 of ${counts.join(', ')}`);
  if (published) {
    const wantedCounts = [published.V, published.E, published.F].join(', ');
    if (counts.join(', ') !== wantedCounts)
      wrong(`joints, struts, faces are ${counts.join(', ')}; published ${wantedCounts}`);
    if (sidesOf(read) !== published.faces) wrong(`faces are ${sidesOf(read)}; published ${published.faces}`);
  }
  const off = strutLengths(read).reduce((most, length) => Math.max(most, Math.abs(length - 1)), 0);
  if (off > MOST_EDGE_ERROR) wrong(`edges differ from 1 by up to ${off}`);
  const other = firstOther(anglesOf(read), publishedAngles(solid.dihedrals));
  if (other !== null) wrong(`dihedral angles are ${other}`);
  // As it would be built: a quarter of a metre to the edge, one setting of the stop.
  const large = parseObj(objOf(solid), { mmPerUnit: 250 });
  const classes = large.ok ? frameFigures(large.value.frame).lengthClasses : [];
  if (classes.length !== 1 || Math.abs(classes[0]!.lengthMm - 250) > 250 * MOST_EDGE_ERROR)
    wrong(`at 250 mm to the edge its lengths are ${classes.map(({ lengthMm }) => lengthMm).join(', ')} mm`);
  return found;
}
