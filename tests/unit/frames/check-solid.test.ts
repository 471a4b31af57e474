import { describe, expect, it } from 'vitest';
import { checkSolid, type Published, type Solid } from '../../bench/polyhedra/check-solid';

/** A square pyramid of edge 1, which no data of others is needed for. */
const solid: Solid = {
  vertices: [
    [0.5, 0.5, 0],
    [-0.5, 0.5, 0],
    [-0.5, -0.5, 0],
    [0.5, -0.5, 0],
    [0, 0, Math.SQRT1_2],
  ],
  edges: [
    [0, 1],
    [1, 2],
    [2, 3],
    [3, 0],
    [0, 4],
    [1, 4],
    [2, 4],
    [3, 4],
  ],
  faces: [
    [3, 2, 1, 0],
    [0, 1, 4],
    [1, 2, 4],
    [2, 3, 4],
    [3, 0, 4],
  ],
  dihedrals: '3-3:109.47(x4) 3-4:54.74(x4)',
};
const published: Published = {
  V: 5,
  E: 8,
  F: 5,
  faces: '4x3 1x4',
};

describe('checkSolid', () => {
  it('checkSolid > a square pyramid and what is published of it > nothing wrong', () => {
    expect(checkSolid(solid, published)).toEqual([]);
  });

  it.each<[string, Partial<Published>, RegExp]>([
    ['another count', { E: 9 }, /published 5, 9, 5/],
    ['other faces', { faces: '3x3 2x4' }, /faces are 4x3 1x4/],
  ])('checkSolid > %s published > said', (_, part, words) => {
    const found = checkSolid(solid, { ...published, ...part });
    expect(found).toHaveLength(1);
    expect(found[0]).toMatch(words);
  });

  it.each([
    ['an angle off by two hundredths', '3-3:109.49(x4) 3-4:54.74(x4)', /109\.4712; published 3-3:109\.49/],
    ['an angle less often', '3-3:109.47(x3) 3-4:54.74(x4)', /8 of them; published 7/],
    ['an angle between other faces', '3-3:109.47(x4) 4-4:54.74(x4)', /published 4-4/],
    ['no angle at all', 'nothing', /8 of them; published 1/],
  ])('checkSolid > %s published > said', (_, dihedrals, words) => {
    const found = checkSolid({ ...solid, dihedrals }, published);
    expect(found).toHaveLength(1);
    expect(found[0]).toMatch(words);
  });

  it('checkSolid > nothing in the table, and a face less > Euler says that it is not closed', () => {
    expect(checkSolid(solid, null)).toEqual([]);
    const open: Solid = { ...solid, faces: solid.faces.slice(1) };
    expect(checkSolid(open, null)[0]).toMatch(/not 2 of 5, 8, 4/);
  });

  it('checkSolid > a tip that stands a millionth too high > its edges are not 1', () => {
    const high = {
      ...solid,
      vertices: solid.vertices.map((place) => [...place] as [number, number, number]),
    };
    high.vertices[4]![2] += 1e-6;
    expect(checkSolid(high, published)).toEqual([
      expect.stringMatching(/^edges differ/),
      expect.stringMatching(/^at 250 mm/),
    ]);
  });

  it('checkSolid > a joint without struts, an edge twice > came in changed, or refused', () => {
    const loose: Solid = { ...solid, vertices: [...solid.vertices, [3, 3, 3]] };
    expect(checkSolid(loose, published)).toContain('OBJ came in changed');
    expect(checkSolid(loose, published)).toContain('CSV came in changed');
    const twice: Solid = { ...solid, edges: [...solid.edges, [1, 0]] };
    expect(checkSolid(twice, published).join(' ')).toMatch(/OBJ was refused.*CSV was refused/);
  });
});
