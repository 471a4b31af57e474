import { describe, expect, it } from 'vitest';
import {
  buildShape,
  CSV_MOST_BYTES,
  formatFrameCsv,
  parseFrameCsv,
  validateFrame,
} from '../../../shared/frames';

const TRIANGLE = 'joint,x,y,z\n1,0,0,0\n2,100,0,0\n3,0,100.5,0\nstrut,from,to\n1,1,2\n2,2,3\n3,3,1\n';
const read = (text: string, mmPerUnit?: number) => {
  const result = parseFrameCsv(text, mmPerUnit === undefined ? {} : { mmPerUnit });
  if (!result.ok) throw new Error(JSON.stringify(result.refusal));
  return result.value;
};
const problems = (text: string) => {
  const result = parseFrameCsv(text);
  if (result.ok) throw new Error('read');
  return result.refusal;
};
const codes = (text: string) => problems(text).map(({ code, line }) => [code, line]);

describe('parseFrameCsv', () => {
  it('a triangle > read > joints and struts in the order of the file', () => {
    expect(read(TRIANGLE)).toEqual({
      frame: {
        joints: [
          { x: 0, y: 0, z: 0 },
          { x: 100, y: 0, z: 0 },
          { x: 0, y: 100.5, z: 0 },
        ],
        struts: [
          [0, 1],
          [1, 2],
          [2, 0],
        ],
        faces: [],
      },
      notes: [],
    });
  });

  it('semicolons and decimal commas, tabs, CRLF, a byte order mark, quotes, capitals > read > the same triangle', () => {
    const { frame } = read(TRIANGLE);
    expect(read(TRIANGLE.replaceAll(',', ';').replace('100.5', '100,5')).frame).toEqual(frame);
    expect(read(TRIANGLE.replaceAll(',', '\t')).frame).toEqual(frame);
    expect(read(`\uFEFF${TRIANGLE.replaceAll('\n', '\r\n')}`).frame).toEqual(frame);
    expect(read(TRIANGLE.replace('100.5', '"100.5"')).frame).toEqual(frame);
    expect(
      read(TRIANGLE.replace('joint,x,y,z', 'Joints,X (mm),Y (mm),Z (mm)').replace('strut,', 'Struts, '))
        .frame,
    ).toEqual(frame);
  });

  it('struts before joints, rows of empty cells, further columns, names that are words > read > the same triangle', () => {
    const text =
      'strut,from,to,length\n1,foot,2,100\n,,,\n2,2,"a ""top"", high"\n3,"a ""top"", high",foot\n\n' +
      'joint,x,y,z,note\nfoot,0,0,0,glue first\n2,100,0,0\n"a ""top"", high",0,100.5,0\n';
    expect(read(text).frame).toEqual(read(TRIANGLE).frame);
  });

  it('a unit of 25.4 mm > read > places in millimetres', () => {
    expect(read(TRIANGLE, 25.4).frame.joints[1]!.x).toBeCloseTo(2540, 9);
  });

  it('a face whose edges are no struts, a joint without a strut > read > struts added, the joint left out, both said', () => {
    const { frame, notes } = read(
      'joint,x,y,z\n9,5,5,5\n1,0,0,0\n2,100,0,0\n3,0,100,0\nstrut,from,to\n1,2,1\nface,joints\n1,1,2,3\n',
    );
    expect(frame.struts).toEqual([
      [1, 0],
      [1, 2],
      [2, 0],
    ]);
    expect(frame.faces).toEqual([[0, 1, 2]]);
    expect(notes.map(({ line }) => line)).toEqual([2, 9]);
    expect(notes[0]!.message).toContain('"9"');
    expect(notes[1]!.message).toContain('2 edges');
    expect(validateFrame(frame)).toEqual([]);
  });

  it('many things wrong > read > every one with its line, in the order of the lines', () => {
    const text = [
      'joint,x,y,z', // 1
      '1,0,0,0',
      '1,0,9,0', // 3
      '2,nan,0,0', // 4
      '3,1,two,0', // 5
      '4,1,2', // 6
      '5,0,0,0.05', // 7
      '6,9e9,0,0', // 8
      '7,50,0,0',
      'strut,to,from', // 10
      '1,1,99', // 11
      '2,1,1', // 12
      '3,1,7',
      '4,7,1', // 14
      '5,1', // 15
      'face,joints',
      '1,1,7', // 17
      '2,1,7,1', // 18
    ].join('\n');
    expect(codes(text)).toEqual([
      ['CSV_NAME_TWICE', 3],
      ['CSV_NOT_A_NUMBER', 4],
      ['CSV_NOT_A_NUMBER', 5],
      ['CSV_TOO_FEW_CELLS', 6],
      ['CSV_SAME_PLACE', 7],
      ['CSV_TOO_FAR', 8],
      ['CSV_BAD_HEADING', 10],
      ['CSV_MISSING_JOINT', 11],
      ['CSV_ZERO_LENGTH', 12],
      ['CSV_DOUBLED_STRUT', 14],
      ['CSV_TOO_FEW_CELLS', 15],
      ['CSV_TOO_FEW_CELLS', 17],
      ['CSV_BAD_FACE', 18],
    ]);
    const found = problems(text);
    expect(found[0]).toMatchObject({ otherLine: 2, message: expect.stringMatching(/^Line 3: .*line 2/) });
    expect(found[8]!.message).toContain('"1"');
    expect(found.find(({ code }) => code === 'CSV_DOUBLED_STRUT')).toMatchObject({ otherLine: 13 });
  });

  it.each([
    ['nothing', '', [['CSV_NO_STRUTS', 1]]],
    ['joints alone', 'joint,x,y,z\n1,0,0,0\n2,5,0,0', [['CSV_NO_STRUTS', 3]]],
    ['no heading', '1,0,0,0\n2,5,0,0', [['CSV_NO_HEADING', 1]]],
    [
      'a quote that stays open',
      `${TRIANGLE}4,"1,2\n5,2,3`,
      [
        ['CSV_OPEN_QUOTE', 9],
        ['CSV_TOO_FEW_CELLS', 9],
      ],
    ],
  ])('%s > read > refused as %s', (_, text, expected) => {
    expect(codes(text)).toEqual(expected);
  });

  it('more than 50 problems > read > 49 and how many more', () => {
    const found = problems(`joint,x,y,z\n${'1,a,0,0\n'.repeat(60)}`);
    expect(found).toHaveLength(50);
    // 60 bad numbers and 59 names that were there before.
    expect(found.at(-1)).toMatchObject({
      code: 'CSV_MORE_PROBLEMS',
      message: expect.stringContaining('70 more'),
    });
  });

  it('more than 2 MB, more than 20,000 struts > read > refused with the numbers', () => {
    expect(problems('é'.repeat(CSV_MOST_BYTES / 2 + 1))[0]).toMatchObject({
      code: 'CSV_TOO_LARGE',
      message: expect.stringContaining('2.0 MB'),
    });
    const rows = (count: number) =>
      `joint,x,y,z\n${Array.from({ length: count }, (_, at) => `${at},${at},0,0`).join('\n')}\n` +
      `strut,from,to\n${Array.from({ length: count - 1 }, (_, at) => `${at},${at},${at + 1}`).join('\n')}\n`;
    expect(read(rows(20_000)).frame.struts).toHaveLength(19_999);
    expect(codes(rows(20_002))).toEqual([
      ['CSV_TOO_LARGE', 20_002],
      ['CSV_TOO_LARGE', 20_004 + 20_001],
    ]);
  });
});

describe('formatFrameCsv', () => {
  it('tetrahedron > written > three sections counted from 1, read back to the same frame', () => {
    const frame = buildShape({ kind: 'tetrahedron', edgeMm: 300 });
    const text = formatFrameCsv(frame);
    expect(text.split('\r\n').filter((line) => /^[a-z]/.test(line))).toEqual([
      'joint,x,y,z',
      'strut,from,to',
      'face,joints',
    ]);
    expect(text).toContain('\r\n1,3,2,1\r\n');
    expect(read(text).frame).toEqual(frame);
  });

  it('a frame without faces > written > no section for them', () => {
    expect(formatFrameCsv({ ...buildShape({ kind: 'cube', edgeMm: 100 }), faces: [] })).not.toContain('face');
  });
});
