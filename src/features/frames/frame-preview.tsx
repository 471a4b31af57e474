import { useState } from 'react';
import type { Frame, View } from '../../../shared/frames';
import type { LengthUnit } from '../../../shared/kernel/lengths';
import { ChoiceRow } from '../../components/ui/heads';
import { UnrolledDrawing } from '../../components/ui/unrolled-drawing';
import { FrameFigures } from './frame-figures-table';

type Numbers = 'joints' | 'struts' | 'both' | 'none';

const VIEWS: readonly { value: View; label: string }[] = [
  { value: 'auto', label: 'Clearest' },
  { value: 'front', label: 'Front' },
  { value: 'side', label: 'Side' },
  { value: 'top', label: 'Top' },
];
const NUMBERS: readonly { value: Numbers; label: string }[] = [
  { value: 'both', label: 'All numbers' },
  { value: 'joints', label: 'Joints' },
  { value: 'struts', label: 'Struts' },
  { value: 'none', label: 'No numbers' },
];
/** Above this many struts their numbers cover the drawing, until somebody asks for them. */
const BOTH_UP_TO = 60;

/** The flat drawing of a frame with its numbers, and its figures. */
export function FramePreview({ frame, unit, name }: { frame: Frame; unit: LengthUnit; name: string }) {
  const [view, setView] = useState<View>('auto');
  const [chosen, setChosen] = useState<Numbers | null>(null);
  const numbers = chosen ?? (frame.struts.length <= BOTH_UP_TO ? 'both' : 'joints');
  return (
    <div className="grid gap-5">
      <div className="flex flex-wrap justify-between gap-x-10 gap-y-2">
        <ChoiceRow label="view" choices={VIEWS} value={view} onChange={setView} />
        <ChoiceRow label="numbers" choices={NUMBERS} value={numbers} onChange={setChosen} />
      </div>
      <UnrolledDrawing frame={frame} unit={unit} view={view} numbers={numbers} label={name || 'The frame'} />
      {numbers === 'both' && (
        <p className="text-small text-pencil">
          <strong className="text-ink">Bold</strong> numbers are joints,{' '}
          <span className="font-light">thin</span> ones are struts.
        </p>
      )}
      <FrameFigures frame={frame} unit={unit} />
    </div>
  );
}
