import { describe, expect, it } from 'vitest';
import { buildShape, formatObj, OBJ_MOST_BYTES, parseObj, validateFrame } from '../../../shared/frames';
import type { ObjProblem, ObjReading } from '../../../shared/frames';

function read(text: string, mmPerUnit?: number): ObjReading {
  const result = parseObj(text, { mmPerUnit });
  if (!result.ok) throw new Error(JSON.stringify(result.refusal));
  return result.value;
}

function problems(text: string): ObjProblem[] {
  const result = parseObj(text);
  return result.ok ? [] : result.refusal;
}

const SQUARE = 'v 0 0 0\nv 100 0 0\nv 100 100 0\nv 0 100 0\n';

describe('parseObj', () => {
  it('two triangles that share an edge > read > five struts, the shared edge once and no fault', () => {
    const { frame, notes } = read(`${SQUARE}f 1 2 3\nf 1 3 4\n`);
    expect(frame.struts).toEqual([
      [0, 1],
      [1, 2],
      [2, 0],
      [2, 3],
      [3, 0],
    ]);
    expect(frame.faces).toEqual([
      [0, 1, 2],
      [0, 2, 3],
    ]);
    expect(notes).toEqual([]);
  });

  it('polyline > read > a strut between each two neighbours', () => {
    expect(read(`${SQUARE}l 1 2 3 4 1\n`).frame.struts).toEqual([
      [0, 1],
      [1, 2],
      [2, 3],
      [3, 0],
    ]);
  });

  it('all forms of an index > read > the same face', () => {
    const forms = [
      '1 2 3',
      '1/7 2/8 3/9',
      '1//4 2//4 3//4',
      '1/7/4 2/8/4 3/9/4',
      '-4 -3 -2',
      '-4/1 -3//2 3/-1/-1',
    ];
    for (const form of forms) expect(read(`${SQUARE}f ${form}\nl 3 4`).frame.faces).toEqual([[0, 1, 2]]);
  });

  it('negative index in the middle > read > counts back from the joints before it', () => {
    expect(read('v 0 0 0\nv 50 0 0\nl -1 -2\nv 90 0 0\nl -1 1').frame.struts).toEqual([
      [1, 0],
      [2, 0],
    ]);
  });

  it('comments, groups, materials, normals, CRLF, byte order mark, extra numbers > read > passed over', () => {
    const text = `\uFEFF# head\r\nmtllib a.mtl\r\no thing\r\ng a b\r\ns off\r\nusemtl red\r\nvn 0 0 1\r\nvt 0 0\r\nv 0 0 0 1.0\r\n  v\t30 0 0 0.5 0.5 0.5 # red\r\n\r\nl 1 2 # strut\r\n`;
    const { frame } = read(text);
    expect(frame.joints).toEqual([
      { x: 0, y: 0, z: 0 },
      { x: 30, y: 0, z: 0 },
    ]);
    expect(frame.struts).toEqual([[0, 1]]);
  });

  it('line that goes on after a backslash > read > one line, and a fault names the line of the word', () => {
    expect(read(`${SQUARE}f 1 2 \\\n 3 \\\n 4\n`).frame.faces).toEqual([[0, 1, 2, 3]]);
    expect(problems(`${SQUARE}f 1 2 \\\n 3 \\\n 9\n`)[0]).toMatchObject({
      code: 'OBJ_MISSING_JOINT',
      line: 7,
    });
  });

  it('joint named before it stands in the file > read > found', () => {
    expect(read('l 1 2\nv 0 0 0\nv 70 0 0\n').frame.struts).toEqual([[0, 1]]);
  });

  it('line along the edge of a face > read > one strut, in the order of first mention', () => {
    const { frame } = read(`${SQUARE}l 2 1\nf 1 2 3\nl 3 4\n`);
    expect(frame.struts).toEqual([
      [1, 0],
      [1, 2],
      [2, 0],
      [2, 3],
    ]);
  });

  it('file in metres > read with 1,000 mm per unit > coordinates in mm', () => {
    expect(read('v 0 0 0\nv 0.5 0 0\nl 1 2', 1000).frame.joints[1]).toEqual({ x: 500, y: 0, z: 0 });
  });

  it('tiny frame > read > note that the unit may be another', () => {
    const { notes } = read('v 0 0 0\nv 1.5 0 0\nl 1 2');
    expect(notes.map(({ message }) => message).join()).toContain('The longest strut is 1.5 mm');
  });

  it('joints per face, a loose joint, a face twice, a curve > read > joined or left out, each said', () => {
    const text = `${SQUARE}v 0 0 0\nv 100 100 0\nv 0 100 0\nv 7 7 7\nf 1 2 3\nf 5 6 7\nf 7 5 6\ncurv 0 1 1 2\nl 3 4`;
    const { frame, notes } = read(text);
    expect(frame.joints).toHaveLength(4);
    expect(frame.struts).toHaveLength(5);
    expect(frame.faces).toHaveLength(2);
    expect(validateFrame(frame)).toEqual([]);
    expect(notes.map(({ line, message }) => `${line}: ${message}`)).toEqual([
      '5: 3 joints are where earlier ones are; each place is one joint.',
      '8: This joint belongs to no strut and was left out.',
      '11: This face was there before and counts once.',
      '12: A curved line or surface was left out: struts are straight.',
    ]);
  });
});

describe('parseObj of a bad file', () => {
  const cases: [string, string, Partial<ObjProblem>, string][] = [
    ['v with two numbers', 'v 0 0 0\nv 1 0', { code: 'OBJ_CUT_OFF', line: 2 }, 'needs 3 numbers and has 2'],
    [
      'l with one joint',
      `${SQUARE}l 1 2\nl 3`,
      { code: 'OBJ_CUT_OFF', line: 6 },
      'needs at least 2 joints and has 1',
    ],
    [
      'f with two joints',
      `${SQUARE}f 1 2`,
      { code: 'OBJ_CUT_OFF', line: 5 },
      'needs at least 3 joints and has 2',
    ],
    ['end after a backslash', `${SQUARE}l 1 2 3\\`, { code: 'OBJ_CUT_OFF', line: 5 }, 'the file ends'],
    ['v that ends after a backslash', 'v 1 2 3 \\', { code: 'OBJ_CUT_OFF', line: 1 }, 'the file ends'],
    ['missing joint', `${SQUARE}l 1 5`, { code: 'OBJ_MISSING_JOINT', line: 5 }, 'the file has 4'],
    ['negative past the first', `${SQUARE}l 1 -5`, { code: 'OBJ_MISSING_JOINT', line: 5 }, '"-5"'],
    ['index 0', `${SQUARE}l 1 0`, { code: 'OBJ_BAD_INDEX', line: 5 }, '"0" is no joint number'],
    ['index 1.5', `${SQUARE}l 1 1.5`, { code: 'OBJ_BAD_INDEX', line: 5 }, '"1.5"'],
    ['NaN', 'v 0 nan 0\nv 1 0 0\nl 1 2', { code: 'OBJ_NOT_A_NUMBER', line: 1 }, 'no finite number'],
    [
      'infinity',
      'v 0 0 0\nv 1 -Infinity 0\nl 1 2',
      { code: 'OBJ_NOT_A_NUMBER', line: 2 },
      'no finite number',
    ],
    [
      'a number past all numbers',
      'v 0 0 0\nv 1e999 0 0\nl 1 2',
      { code: 'OBJ_NOT_A_NUMBER', line: 2 },
      '1e999',
    ],
    ['a word', 'v 0 zero 0\nv 1 0 0\nl 1 2', { code: 'OBJ_NOT_A_NUMBER', line: 1 }, '"zero" is not a number'],
    ['a decimal comma', 'v 0,5 0 0\nv 1 0 0\nl 1 2', { code: 'OBJ_NOT_A_NUMBER', line: 1 }, '"0,5"'],
    ['1,001 m away', 'v 0 0 0\nv 1001000 0 0\nl 1 2', { code: 'OBJ_TOO_FAR', line: 2 }, '1 km'],
    [
      'strut from a joint to itself',
      `${SQUARE}l 1 2\nl 3 3`,
      { code: 'OBJ_ZERO_LENGTH', line: 6 },
      'both ends are joint 3',
    ],
    [
      'strut of 0.05 mm',
      'v 0 0 0\nv 0.05 0 0\nv 9 9 9\nl 1 3\nl 1 2',
      { code: 'OBJ_ZERO_LENGTH', line: 5 },
      '(lines 1 and 2)',
    ],
    ['edge without length in a face', `${SQUARE}f 1 2 2 3`, { code: 'OBJ_ZERO_LENGTH', line: 5 }, 'joint 2'],
    [
      'strut twice',
      `${SQUARE}l 1 2\nl 3 4\nl 2 1`,
      { code: 'OBJ_DOUBLED_STRUT', line: 7, otherLine: 5 },
      'already on line 5',
    ],
    [
      'strut twice by other joints at the same places',
      `${SQUARE}v 0 0 0\nl 1 2\nl 5 2`,
      { code: 'OBJ_DOUBLED_STRUT', line: 7, otherLine: 6 },
      'line 6',
    ],
    [
      'strut twice besides a face along it',
      `${SQUARE}f 1 2 3\nl 1 2\nl 2 1`,
      { code: 'OBJ_DOUBLED_STRUT', line: 7, otherLine: 6 },
      'already on line 6',
    ],
    [
      'strut there and back in one line',
      `${SQUARE}l 1 2 1`,
      { code: 'OBJ_DOUBLED_STRUT', line: 5, otherLine: 5 },
      'line 5',
    ],
    ['face through a joint twice', `${SQUARE}f 1 2 3 4 2`, { code: 'OBJ_BAD_FACE', line: 5 }, 'twice'],
    ['unknown line', `${SQUARE}<html>\nl 1 2`, { code: 'OBJ_UNKNOWN_LINE', line: 5 }, '"<html>"'],
    ['joints only', SQUARE, { code: 'OBJ_NO_STRUTS', line: 4 }, 'nothing to cut'],
    ['empty file', '', { code: 'OBJ_NO_STRUTS', line: 1 }, 'nothing to cut'],
  ];
  for (const [name, text, expected, words] of cases)
    it(`${name} > read > ${expected.code} on line ${expected.line}, alone`, () => {
      const found = problems(text);
      expect(found).toHaveLength(1);
      expect(found[0]).toMatchObject(expected);
      expect(found[0]!.message).toContain(words);
      expect(found[0]!.message).toContain(`Line ${expected.line}:`);
    });

  it('several faults > read > all of them in the order of their lines', () => {
    const found = problems('v 0 0 0\nv NaN 0 0\nv 1 0\nv 40 0 0\nl 1 9\nl 4 4\nl 1 4\nl 1 4\nzzz');
    expect(found.map(({ line, code }) => `${line} ${code}`)).toEqual([
      '2 OBJ_NOT_A_NUMBER',
      '3 OBJ_CUT_OFF',
      '5 OBJ_MISSING_JOINT',
      '6 OBJ_ZERO_LENGTH',
      '8 OBJ_DOUBLED_STRUT',
      '9 OBJ_UNKNOWN_LINE',
    ]);
  });

  it.each([
    [50, 50, 'OBJ_UNKNOWN_LINE'],
    [51, 50, 'OBJ_MORE_PROBLEMS'],
    [3000, 50, 'OBJ_MORE_PROBLEMS'],
  ])('%i faults > read > %i entries, the last one %s', (count, entries, last) => {
    const found = problems('rubbish\n'.repeat(count));
    expect(found).toHaveLength(entries);
    expect(found.at(-1)!.code).toBe(last);
    if (count > 50) expect(found.at(-1)!.message).toContain(`${count - 49} more problems`);
  });

  it('more than 2 MB > read > refused with the size and the line where 2 MB end', () => {
    const line = `${'#'.repeat(99)}\n`;
    expect(problems(line.repeat(OBJ_MOST_BYTES / 100 + 1))).toEqual([
      { code: 'OBJ_TOO_LARGE', line: 20_001, message: expect.stringContaining('2.0 MB; at most 2 MB') },
    ]);
  });

  it('2 MB counted in bytes > text of two-byte letters > refused although it has fewer letters', () => {
    expect(problems('é'.repeat(OBJ_MOST_BYTES / 2 + 1))[0]!.code).toBe('OBJ_TOO_LARGE');
  });

  it('20,001 struts and 20,002 joints > read > refused at the lines that pass the limits', () => {
    const joints = Array.from({ length: 20_002 }, (_, at) => `v ${at} 0 0`).join('\n');
    const struts = Array.from({ length: 20_001 }, (_, at) => `l ${at + 1} ${at + 2}`).join('\n');
    expect(problems(`${joints}\n${struts}`).map(({ code, line }) => [code, line])).toEqual([
      ['OBJ_TOO_LARGE', 20_001],
      ['OBJ_TOO_LARGE', 20_002 + 20_001],
    ]);
  });
});

describe('formatObj', () => {
  it('tetrahedron > written > joints, struts and faces counted from 1, read back to the same frame', () => {
    const frame = buildShape({ kind: 'tetrahedron', edgeMm: 300 });
    const text = formatObj(frame);
    expect(text.match(/^v /gm)).toHaveLength(4);
    expect(text.match(/^l /gm)).toHaveLength(6);
    expect(text).toContain('\nf 3 2 1\n');
    expect(read(text).frame).toEqual(frame);
  });
});
