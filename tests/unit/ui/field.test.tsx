// @vitest-environment jsdom
import { cleanup, render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { useState } from 'react';
import { afterEach, describe, expect, it } from 'vitest';
import { CodeField } from '../../../src/components/ui/code-field';
import { CheckField } from '../../../src/components/ui/choices';
import { Field, SelectField, TextArea } from '../../../src/components/ui/field';

afterEach(cleanup);

const describedBy = (element: HTMLElement): string =>
  (element.getAttribute('aria-describedby') ?? '')
    .split(' ')
    .map((id) => document.getElementById(id)?.textContent ?? '')
    .join(' | ');

describe('Field', () => {
  it('Field > an error and a hint > both describe the input, which is marked invalid', () => {
    render(<Field label="crew" error="At least 1, please." hint="Places on the step." unit="people" />);
    const input = screen.getByLabelText('crew');
    expect(input.getAttribute('aria-invalid')).toBe('true');
    expect(describedBy(input)).toBe('At least 1, please. | Places on the step.');
  });

  it('Field > no error > not invalid, described by nothing', () => {
    render(<Field label="crew" />);
    const input = screen.getByLabelText('crew');
    expect(input.hasAttribute('aria-invalid')).toBe(false);
    expect(input.hasAttribute('aria-describedby')).toBe(false);
  });

  it('TextArea, SelectField, CheckField > an error > tied to the control in the same way', () => {
    render(
      <>
        <TextArea label="reason" error="Please fill this in." />
        <SelectField label="station" error="Please choose one.">
          <option>glue 2</option>
        </SelectField>
        <CheckField error="Please tick it.">I have read it</CheckField>
      </>,
    );
    expect(describedBy(screen.getByLabelText('reason'))).toBe('Please fill this in.');
    expect(describedBy(screen.getByLabelText('station'))).toBe('Please choose one.');
    expect(describedBy(screen.getByRole('checkbox'))).toBe('Please tick it.');
  });
});

function Door() {
  const [code, setCode] = useState('');
  return (
    <CodeField label="code on the poster" value={code} onChange={setCode} error={code ? '' : 'Empty.'} />
  );
}

describe('CodeField', () => {
  it('CodeField > pasted with a dash, small letters and too long > capitals and figures, six of them, in cells', async () => {
    const { container } = render(<Door />);
    const input = screen.getByLabelText<HTMLInputElement>('code on the poster');
    await userEvent.click(input);
    await userEvent.paste(' k7m-2rq9 ');
    expect(input.value).toBe('K7M2RQ');
    expect([...container.querySelectorAll('.code-cell')].map((cell) => cell.textContent).join('')).toBe(
      'K7M2RQ',
    );
  });

  it('CodeField > the cells > one real input, the cells hidden from readers', () => {
    const { container } = render(<Door />);
    expect(screen.getAllByRole('textbox')).toHaveLength(1);
    for (const cell of container.querySelectorAll('.code-cell'))
      expect(cell.getAttribute('aria-hidden')).toBe('true');
    expect(describedBy(screen.getByRole('textbox'))).toBe('Empty.');
  });
});
