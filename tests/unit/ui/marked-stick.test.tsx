// @vitest-environment jsdom
import { cleanup, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, it } from 'vitest';
import { MarkedStick } from '../../../src/components/ui/marked-stick';
import { StateWord } from '../../../src/components/ui/strut-glyph';
import { GLYPH_STATES, glyphParts, stickParts } from '../../../src/components/ui/strut-geometry';

afterEach(cleanup);

const OPTIONS = { pitch: 56, height: 30, unit: 1, pad: 8 };

describe('MarkedStick', () => {
  it('MarkedStick > a piece in work > one picture whose words tell passed, worked and waiting steps', () => {
    render(
      <MarkedStick
        code="V-09"
        steps={[
          { name: 'cut', state: 'passed' },
          { name: 'tack', state: 'in hand' },
          { name: 'coat', state: 'waiting' },
          { name: 'hang', state: 'waiting' },
        ]}
      />,
    );
    expect(screen.getByRole('img').getAttribute('aria-label')).toBe(
      'V-09: 1 of 4 steps passed, tack in hand, 2 waiting',
    );
  });

  it('MarkedStick > every step passed > an unbroken stick: cut marks, and no joint', () => {
    const { parts, width } = stickParts(
      [{ state: 'passed' }, { state: 'passed' }, { state: 'passed' }],
      OPTIONS,
    );
    expect(parts.filter((part) => part.kind === 'circle')).toEqual([]);
    expect(parts).toHaveLength(3 + 4);
    expect(width).toBe(8 + 3 * 56 + 8);
  });

  it('MarkedStick > one step worked on > joints at its two ends and nowhere else', () => {
    const { parts } = stickParts([{ state: 'passed' }, { state: 'ready' }, { state: 'waiting' }], OPTIONS);
    const joints = parts.filter((part) => part.kind === 'circle');
    expect(joints.map(({ cx, fill, state }) => [cx, fill, state])).toEqual([
      [64, 'state', 'passed'],
      [120, 'ground', 'ready'],
    ]);
  });

  it('MarkedStick > a pitch for a phone > as long as its steps', () => {
    const { container } = render(
      <MarkedStick code="L-01" steps={[{ name: 'cut', state: 'ready' }]} pitch={84} />,
    );
    expect(container.querySelector('svg')?.getAttribute('width')).toBe('100');
  });
});

describe('glyphs', () => {
  it('glyphParts > all eight states > eight different drawings even without colour', () => {
    const drawings = GLYPH_STATES.map((state) => JSON.stringify(glyphParts(state, 16)));
    expect(GLYPH_STATES).toHaveLength(8);
    expect(new Set(drawings).size).toBe(8);
  });

  it('glyphParts > passed at 16 > the geometry as drawn: strut 4 thick from 5 to 33 on 9, joints of 3.7', () => {
    expect(glyphParts('passed', 16)).toEqual([
      { kind: 'path', d: 'M5 9H33', width: 4 },
      { kind: 'circle', cx: 5, cy: 9, r: 3.7, fill: 'state' },
      { kind: 'circle', cx: 33, cy: 9, r: 3.7, fill: 'state' },
    ]);
  });

  it('glyphParts > drying at the start and at the end > the tick stands at the share of time gone, kept inside', () => {
    const tick = (share: number): string => {
      const part = glyphParts('drying', 16, share)[1];
      return part?.kind === 'path' ? part.d : '';
    };
    expect(tick(0)).toBe('M9 0v4.4');
    expect(tick(1)).toBe('M29 0v4.4');
    expect(tick(7)).toBe(tick(1));
  });

  it('StateWord > any state > its word stands beside its mark', () => {
    const { container } = render(<StateWord state="rework" />);
    expect(container.textContent).toBe('rework');
    expect(container.querySelector('svg')?.getAttribute('data-glyph')).toBe('rework');
  });
});
