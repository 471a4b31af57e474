// @vitest-environment jsdom
import { cleanup, fireEvent, screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { ObjForm } from '../../../src/features/frames/obj-form';
import { typedLength } from '../../../src/lib/formats';
import { ShapeForm } from '../../../src/features/frames/shape-form';
import { errorsShown, fakeServer, show } from './client';

afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});

const WISH = { method: 'POST', path: '/installations/x/frames' } as const;

function showShape(unit: 'mm' | 'inch', initial?: React.ComponentProps<typeof ShapeForm>['initial']) {
  const onDone = vi.fn();
  show(
    <ShapeForm unit={unit} wish={WISH} words="Add" initial={initial} onDone={onDone} onCancel={vi.fn()} />,
  );
  return onDone;
}

const cube = (edgeMm: number) => ({ name: 'Box', shape: { kind: 'cube', edgeMm } as const });

describe('lengths of a shape', () => {
  it.each([
    ['mm', '400', 400],
    ['mm', '40 cm', 400],
    ['mm', '0.4 m', 400],
    ['mm', '1.5 in', 38.1],
    ['mm', '1 1/2"', 38.1],
    ['mm', '38,5', 38.5],
    ['inch', '15 3/4', 400.05],
    ['inch', '400 mm', 400],
  ] as const)('ShapeForm > in %s, typed %s > sent as %d mm', async (unit, text, mm) => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { id: 'f' } });
    const onDone = showShape(unit, cube(100));
    const edge = screen.getByLabelText('edge');
    await user.clear(edge);
    await user.type(edge, text);
    await user.click(screen.getByRole('button', { name: 'Add' }));
    await waitFor(() => expect(onDone).toHaveBeenCalled());
    expect(sent[0]?.body).toEqual({ kind: 'shape', name: 'Box', shape: { kind: 'cube', edgeMm: mm } });
  });

  it('ShapeForm > no length, no name, a fraction of a side > every error in its own words, nothing sent', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    showShape('mm');
    await user.selectOptions(screen.getByLabelText('shape'), 'prism');
    const radius = screen.getByLabelText('radius of the base');
    await user.clear(radius);
    await user.type(radius, 'wide');
    const sides = screen.getByLabelText('sides');
    await user.clear(sides);
    await user.type(sides, '4.5');
    await user.click(screen.getByRole('button', { name: 'Add' }));
    expect(errorsShown()).toEqual([
      'Please fill this in.',
      'The number of sides must be a whole number; you gave 4.5.',
      '"wide" is no length. Type it like 400, 40 cm, 1.5 in or 1 1/2".',
    ]);
    expect(sent).toEqual([]);
  });

  it('ShapeForm > the kind changed and changed back > what was typed is still there', async () => {
    const user = userEvent.setup();
    showShape('mm');
    const edge = screen.getByLabelText<HTMLInputElement>('edge');
    await user.clear(edge);
    await user.type(edge, '12 cm');
    await user.selectOptions(screen.getByLabelText('shape'), 'vault-bay');
    await user.selectOptions(screen.getByLabelText('shape'), 'cube');
    expect(screen.getByLabelText<HTMLInputElement>('edge').value).toBe('12 cm');
  });

  it('ShapeForm > a right measure, then a wrong one > drawn with numbers and figures, then nothing to draw', async () => {
    const user = userEvent.setup();
    showShape('mm', cube(400));
    expect(screen.getByRole('img').getAttribute('aria-label')).toContain('8 joints, 12 struts');
    expect(screen.getByRole('rowheader', { name: /400\.0 mm/ })).toBeTruthy();
    expect(screen.getByRole('region', { name: 'Angles' }).textContent).toContain('90.0°');
    await user.clear(screen.getByLabelText('edge'));
    await user.type(screen.getByLabelText('edge'), '2');
    expect(await screen.findByText('Nothing to draw yet.')).toBeTruthy();
  });

  it.each([
    [38.1, '1 1/2'],
    [400, '15.748'],
    [25.4, '1'],
  ])(
    'typedLength > %d mm in an inch installation > shown as %s, which reads back to the same',
    (mm, shown) => {
      expect(typedLength(mm, 'inch')).toBe(shown);
    },
  );
});

const BROKEN = 'v 0 0 0\nv 1 0 0\nl 1 2\nl 2 2\nl 1 7\n';
const TENT = 'v 0 0 0\nv 1 0 0\nv 0 1 0\nf 1 2 3\n';

describe('a frame from a file', () => {
  it('ObjForm > a file with two wrong lines > both named by line, the text kept to be mended, nothing sent', async () => {
    const user = userEvent.setup();
    const sent = fakeServer();
    show(<ObjForm unit="mm" wish={WISH} words="Add" onDone={vi.fn()} onCancel={vi.fn()} />);
    await user.upload(
      screen.getByLabelText('OBJ or CSV file'),
      new File([BROKEN], 'tent.obj', { type: 'text/plain' }),
    );
    const items = await screen.findAllByRole('listitem');
    expect(items.map((item) => /^Line \d+/.exec(item.textContent)?.[0])).toEqual(['Line 4', 'Line 5']);
    expect(screen.getByLabelText<HTMLInputElement>('name of the frame').value).toBe('tent');
    await user.click(screen.getByRole('button', { name: 'Add' }));
    expect(errorsShown()).toEqual(['2 lines of the file need another look.']);
    expect(screen.getByLabelText<HTMLTextAreaElement>('text of the file').value).toBe(BROKEN);
    expect(sent).toEqual([]);
  });

  it('ObjForm > drawn in metres > read, drawn and sent in millimetres', async () => {
    const user = userEvent.setup();
    const sent = fakeServer({ data: { id: 'f' } });
    const onDone = vi.fn();
    show(<ObjForm unit="mm" wish={WISH} words="Add" onDone={onDone} onCancel={vi.fn()} />);
    fireEvent.change(screen.getByLabelText('text of the file'), { target: { value: TENT } });
    await user.type(screen.getByLabelText('name of the frame'), 'Tent');
    await user.selectOptions(screen.getByLabelText('one unit in the file is'), '1000');
    expect(await screen.findByText(/Read as 1\s000 mm across/)).toBeTruthy();
    await user.click(screen.getByRole('button', { name: 'Add' }));
    await waitFor(() => expect(onDone).toHaveBeenCalled());
    expect(sent[0]?.body).toMatchObject({ kind: 'obj', name: 'Tent' });
    expect((sent[0]?.body as { text: string }).text).toContain('v 1000 0 0');
  });

  it('ObjForm > nothing chosen > asked for a file or its text', async () => {
    const user = userEvent.setup();
    fakeServer();
    show(<ObjForm unit="mm" wish={WISH} words="Add" onDone={vi.fn()} onCancel={vi.fn()} />);
    await user.click(screen.getByRole('button', { name: 'Add' }));
    expect(errorsShown()).toEqual(['Please fill this in.', 'Choose a file, or paste its text.']);
  });
});
