import type { Frame } from './frame';
import { baseRadius } from './shape-schema';
import type { Shape } from './shape-schema';
import { buildArchimedean } from './shapes/archimedean';
import { buildCupola } from './shapes/cupola';
import { buildGem } from './shapes/gem';
import { buildGeodesic } from './shapes/geodesic';
import { buildBarrelVault, buildDoubleLayer, buildFlatLattice } from './shapes/lattice';
import {
  cone,
  floor,
  frameOfFaces,
  funnel,
  lid,
  radiusOfEdge,
  ringIndex,
  ringJoints,
  wall,
  zigzag,
} from './stacked-rings';
import { buildVaultBay } from './vault-bay';

const tip = (z: number) => ({ x: 0, y: 0, z });

/** Height between two equal rings, one turned by half a side, so that struts of the given length zigzag between them. */
const zigzagHeight = (strutMm: number, radius: number, sides: number): number =>
  Math.sqrt(strutMm ** 2 - (2 * radius * Math.sin(Math.PI / (2 * sides))) ** 2);

function buildPrism(sides: number, radius: number, height: number): Frame {
  const joints = [...ringJoints(sides, radius, 0, 0), ...ringJoints(sides, radius, height, 0)];
  return frameOfFaces(joints, [floor(0, sides), lid(sides, sides), ...wall(0, sides, sides)]);
}

function buildAntiprism(sides: number, radius: number, height: number): Frame {
  const joints = [...ringJoints(sides, radius, 0, 0), ...ringJoints(sides, radius, height, 1)];
  return frameOfFaces(joints, [floor(0, sides), lid(sides, sides), ...zigzag(0, sides, sides)]);
}

function buildPyramid(sides: number, radius: number, height: number): Frame {
  const joints = [...ringJoints(sides, radius, 0, 0), tip(height)];
  return frameOfFaces(joints, [floor(0, sides), ...cone(0, sides, sides)]);
}

function buildBipyramid(sides: number, radius: number, upper: number, lower: number): Frame {
  const joints = [tip(0), ...ringJoints(sides, radius, lower, 0), tip(lower + upper)];
  return frameOfFaces(joints, [...funnel(1, sides, 0), ...cone(1, sides, sides + 1)]);
}

function buildIcosahedron(edge: number): Frame {
  const radius = radiusOfEdge(edge, 5);
  const cap = Math.sqrt(edge ** 2 - radius ** 2);
  const belt = zigzagHeight(edge, radius, 5);
  const joints = [
    tip(0),
    ...ringJoints(5, radius, cap, 0),
    ...ringJoints(5, radius, cap + belt, 1),
    tip(2 * cap + belt),
  ];
  return frameOfFaces(joints, [...funnel(1, 5, 0), ...zigzag(1, 6, 5), ...cone(6, 5, 11)]);
}

function buildDodecahedron(edge: number): Frame {
  const golden = (1 + Math.sqrt(5)) / 2;
  const radius = radiusOfEdge(edge, 5);
  const wide = golden * radius;
  const skirt = Math.sqrt(edge ** 2 - (wide - radius) ** 2);
  const belt = zigzagHeight(edge, wide, 5);
  const joints = [
    ...ringJoints(5, radius, 0, 0),
    ...ringJoints(5, wide, skirt, 0),
    ...ringJoints(5, wide, skirt + belt, 1),
    ...ringJoints(5, radius, 2 * skirt + belt, 1),
  ];
  const around = [0, 1, 2, 3, 4];
  const at = (ring: number, place: number) => ringIndex(5 * ring, 5, place);
  return frameOfFaces(joints, [
    floor(0, 5),
    ...around.map((k) => [at(0, k), at(0, k + 1), at(1, k + 1), at(2, k), at(1, k)]),
    ...around.map((k) => [at(3, k + 1), at(3, k), at(2, k), at(1, k + 1), at(2, k + 1)]),
    lid(15, 5),
  ]);
}

/**
 * The frame of a shape.
 * @param shape measures in mm, as `shapeSchema` lets them through
 * @returns a valid frame on the plane z = 0 with its axis along z (a vault: along y), joints numbered from the bottom up and
 *   anticlockwise, every edge a strut, faces anticlockwise seen from outside
 * @throws RangeError for an antiprism or cupola that is neither uniform nor has a height; `shapeSchema` refuses it before
 * Source: constructions by rings, own; edge lengths and angles checked against Coxeter, Regular Polytopes, table I.
 */
export function buildShape(shape: Shape): Frame {
  switch (shape.kind) {
    case 'tetrahedron':
      return buildPyramid(3, radiusOfEdge(shape.edgeMm, 3), shape.edgeMm * Math.sqrt(2 / 3));
    case 'cube':
      return buildPrism(4, radiusOfEdge(shape.edgeMm, 4), shape.edgeMm);
    case 'octahedron': {
      const half = radiusOfEdge(shape.edgeMm, 4);
      return buildBipyramid(4, half, half, half);
    }
    case 'dodecahedron':
      return buildDodecahedron(shape.edgeMm);
    case 'icosahedron':
      return buildIcosahedron(shape.edgeMm);
    case 'prism':
      return buildPrism(shape.sides, baseRadius(shape), shape.heightMm);
    case 'antiprism': {
      const radius = baseRadius(shape);
      const edge = 2 * radius * Math.sin(Math.PI / shape.sides);
      const height = shape.uniform ? zigzagHeight(edge, radius, shape.sides) : shape.heightMm;
      if (height === undefined) throw new RangeError('An antiprism needs a height or equal struts.');
      return buildAntiprism(shape.sides, radius, height);
    }
    case 'pyramid':
      return buildPyramid(shape.sides, baseRadius(shape), shape.heightMm);
    case 'bipyramid':
      return buildBipyramid(shape.sides, baseRadius(shape), shape.upperMm, shape.lowerMm);
    case 'vault-bay':
      return buildVaultBay(shape);
    case 'cupola':
      return buildCupola(shape);
    case 'archimedean':
      return buildArchimedean(shape);
    case 'gem':
      return buildGem(shape);
    case 'geodesic':
      return buildGeodesic(shape);
    case 'barrel-vault':
      return buildBarrelVault(shape);
    case 'flat-lattice':
      return buildFlatLattice(shape);
    case 'double-layer':
      return buildDoubleLayer(shape);
  }
}
