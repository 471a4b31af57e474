import { useDeferredValue, useId, useMemo, useRef, useState } from 'react';
import { createFrameSchema } from '../../../shared/contracts/frames';
import {
  formatFrameCsv,
  formatObj,
  OBJ_MOST_BYTES,
  parseFrameCsv,
  parseObj,
  type Frame,
} from '../../../shared/frames';
import { formatLength, type LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { Field, SelectField, TextArea } from '../../components/ui/field';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { checkInput } from '../../lib/check-input';
import { counted } from '../../lib/formats';
import { useForm } from '../../lib/use-form';
import type { Wish } from '../../lib/use-send';
import { FramePreview } from './frame-preview';

/** Units a file may have been drawn in; the format itself names none. */
const UNITS = [
  { value: '1', label: '1 mm' },
  { value: '10', label: '1 cm' },
  { value: '1000', label: '1 m' },
  { value: '25.4', label: '1 inch' },
] as const;

/** Larger texts are not put into a field: typing in it would crawl. */
const MOST_TO_EDIT = 100_000;

export type ObjFormProps = {
  unit: LengthUnit;
  wish: Pick<Wish, 'method' | 'path'>;
  words: string;
  initial?: { kind: FileKind; name: string; fileName: string; geometry: Frame; revision: number };
  onDone: (reply: { id: string }) => unknown;
  onCancel: () => void;
};

type FileKind = 'obj' | 'csv';

const READERS = { obj: parseObj, csv: parseFrameCsv } as const;
const WRITERS = { obj: formatObj, csv: formatFrameCsv } as const;
const HINTS: Readonly<Record<FileKind, string>> = {
  obj: 'Lines v x y z are joints, l 1 2 struts, f 1 2 3 faces. You can mend it here.',
  csv: 'Under joint,x,y,z a line for each joint, under strut,from,to one for each strut. You can mend it here.',
};

/** What a text is: a table begins with the heading of its joints or struts. */
const kindOf = (text: string): FileKind =>
  /^\uFEFF?\s*"?(joint|strut|face)"?\s*[,;\t]/i.test(text) ? 'csv' : 'obj';

/** A frame from a file, Wavefront OBJ or a CSV of joints and struts: what is wrong is said by line, and can be mended right here. */
export function ObjForm({ unit, wish, words, initial, onDone, onCancel }: ObjFormProps) {
  const [name, setName] = useState(initial?.name ?? '');
  const [fileName, setFileName] = useState(initial?.fileName ?? '');
  const [text, setText] = useState(() => (initial ? WRITERS[initial.kind](initial.geometry) : ''));
  const [mmPerUnit, setMmPerUnit] = useState('1');
  const [unread, setUnread] = useState<string | null>(null);
  const later = useDeferredValue(text);
  const reading = useMemo(
    () => (later.trim() === '' ? null : READERS[kindOf(later)](later, { mmPerUnit: Number(mmPerUnit) })),
    [later, mmPerUnit],
  );
  const form = useForm<{ id: string }>({
    request: () => {
      const kind = kindOf(text);
      const now = READERS[kind](text, { mmPerUnit: Number(mmPerUnit) });
      // Kept in millimetres, whatever the file was drawn in.
      const inMm = now.ok && mmPerUnit !== '1' ? WRITERS[kind](now.value.frame) : text;
      const own =
        text.trim() === ''
          ? [{ path: 'text', code: 'empty', message: 'Choose a file, or paste its text.' }]
          : now.ok
            ? []
            : [{ path: 'text', code: 'obj', message: wrongLines(now.refusal.length) }];
      const checked = checkInput(
        createFrameSchema,
        {
          kind,
          name,
          fileName: fileName || 'pasted text',
          text: inMm,
          ...(initial ? { revision: initial.revision } : {}),
        },
        own,
      );
      return 'problems' in checked ? checked : { ...wish, body: checked.body };
    },
    onDone,
  });
  const take = async (file: File) => {
    setUnread(null);
    // Looked at before it is read: a film chosen by mistake would fill the memory.
    if (file.size > 4 * OBJ_MOST_BYTES) {
      setUnread(
        `${file.name} has ${(file.size / 1e6).toFixed(1)} MB; at most 2 MB are read. Export the wireframe only, or split the drawing.`,
      );
      return;
    }
    try {
      setText(await file.text());
      setFileName(file.name);
      if (name.trim() === '') setName(file.name.replace(/\.(obj|csv)$/i, ''));
    } catch {
      setUnread(`${file.name} could not be read. Choose it again, or open it and paste its text below.`);
    }
  };
  return (
    <div className="grid gap-8">
      <form className="grid gap-5" noValidate onSubmit={form.onSubmit}>
        <Refusal error={form.error} unplaced={form.unplaced} />
        {unread !== null && <Note kind="refused" title={unread} />}
        <div className="grid items-start gap-x-6 gap-y-5 sm:grid-cols-2">
          <Field
            label="name of the frame"
            value={name}
            onChange={(event) => setName(event.target.value)}
            error={form.problem('name')}
          />
          <SelectField
            label="one unit in the file is"
            value={mmPerUnit}
            onChange={(event) => setMmPerUnit(event.target.value)}
          >
            {UNITS.map(({ value, label }) => (
              <option key={value} value={value}>
                {label}
              </option>
            ))}
          </SelectField>
        </div>
        <FilePick fileName={fileName} onPick={(file) => void take(file)} />
        {text.length <= MOST_TO_EDIT ? (
          <TextArea
            label="text of the file"
            className="obj-text"
            rows={8}
            spellCheck={false}
            value={text}
            onChange={(event) => setText(event.target.value)}
            error={form.problem('text')}
            hint={HINTS[kindOf(text)]}
          />
        ) : (
          <p>
            {fileName} has {counted(text.split('\n').length, 'line')}, too many to edit here. Mend it where
            you drew it and choose it again.
          </p>
        )}
        {reading && !reading.ok && (
          <Note kind="refused" title={wrongLines(reading.refusal.length)}>
            <ul className="grid gap-1">
              {reading.refusal.map(({ message }) => (
                <li key={message}>{message}</li>
              ))}
            </ul>
          </Note>
        )}
        {reading?.ok && reading.value.notes.length > 0 && (
          <Note kind="ask" title="Read, with some things set right.">
            <ul className="grid gap-1">
              {reading.value.notes.map(({ message, line }) => (
                <li key={message}>{line === undefined ? message : `Line ${line}: ${message}`}</li>
              ))}
            </ul>
          </Note>
        )}
        <div className="flex flex-wrap items-center gap-6">
          <Action type="submit" look="main" busy={form.busy}>
            {words}
          </Action>
          <Action look="words" onClick={onCancel}>
            Leave it
          </Action>
        </div>
      </form>
      {reading?.ok && (
        <>
          <p>
            Read as {formatLength(longest(reading.value.frame), unit)} across. If that cannot be, the unit
            above is another one.
          </p>
          <FramePreview frame={reading.value.frame} unit={unit} name={name} />
        </>
      )}
    </div>
  );
}

const wrongLines = (count: number): string =>
  `${counted(count, 'line')} of the file ${count === 1 ? 'needs' : 'need'} another look.`;

function longest({ joints }: Frame): number {
  const span = (values: number[]): number =>
    values.reduce((a, b) => Math.max(a, b), -Infinity) - values.reduce((a, b) => Math.min(a, b), Infinity);
  return Math.max(...(['x', 'y', 'z'] as const).map((axis) => span(joints.map((joint) => joint[axis]))));
}

/** The way to a file; the browser's own control does the work behind it. */
function FilePick({ fileName, onPick }: { fileName: string; onPick: (file: File) => void }) {
  const id = useId();
  const input = useRef<HTMLInputElement>(null);
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-1">
      <input
        ref={input}
        id={id}
        type="file"
        accept=".obj,.csv,model/obj,text/csv,text/plain"
        className="sr-only"
        tabIndex={-1}
        aria-label="OBJ or CSV file"
        onChange={(event) => {
          const file = event.target.files?.[0];
          // The same file can be chosen again after it was mended.
          event.target.value = '';
          if (file) onPick(file);
        }}
      />
      <Action onClick={() => input.current?.click()}>Choose an OBJ or CSV file</Action>
      <span className="text-pencil">{fileName === '' ? 'Nothing chosen yet.' : fileName}</span>
    </div>
  );
}
