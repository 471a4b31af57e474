import { useId, useRef, type PointerEvent } from 'react';
import { Action } from '../../components/ui/action';
import { FieldError } from '../../components/ui/measured';

const WIDTH = 600;
const HEIGHT = 160;

interface Props {
  label: string;
  clearWords: string;
  /** Move and line commands in a 600 x 160 box. */
  path: string;
  onChange: (path: string) => void;
  error?: string | undefined;
}

/** A place to sign with a finger or a mouse; whoever cannot draw types instead. */
export function SignaturePad({ label, clearWords, path, onChange, error }: Props) {
  const drawing = useRef(false);
  const id = useId();
  const at = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    const x = Math.round(((event.clientX - box.left) / box.width) * WIDTH);
    const y = Math.round(((event.clientY - box.top) / box.height) * HEIGHT);
    return `${Math.min(WIDTH, Math.max(0, x))} ${Math.min(HEIGHT, Math.max(0, y))}`;
  };
  return (
    <div>
      <div className="flex items-baseline justify-between">
        <span className="field-label" id={`${id}-label`}>
          {label}
        </span>
        {path !== '' && (
          <Action look="words" onClick={() => onChange('')}>
            {clearWords}
          </Action>
        )}
      </div>
      <svg
        className="signature-pad"
        viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
        role="img"
        aria-labelledby={`${id}-label`}
        aria-describedby={error ? `${id}-error` : undefined}
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          drawing.current = true;
          onChange(`${path}M${at(event)}`);
        }}
        onPointerMove={(event) => {
          if (drawing.current) onChange(`${path}L${at(event)}`);
        }}
        onPointerUp={() => {
          drawing.current = false;
        }}
        onPointerCancel={() => {
          drawing.current = false;
        }}
      >
        <path
          d={path}
          fill="none"
          stroke="currentColor"
          strokeWidth="3.5"
          strokeLinecap="round"
          strokeLinejoin="round"
        />
      </svg>
      {error && <FieldError id={`${id}-error`}>{error}</FieldError>}
    </div>
  );
}
