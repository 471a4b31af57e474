import { useState } from 'react';
import type { FrameView } from '../../../shared/contracts/frames';
import type { LengthUnit } from '../../../shared/kernel/lengths';
import { Action } from '../../components/ui/action';
import { ConfirmAction } from '../../components/ui/confirm-action';
import { DimensionHead } from '../../components/ui/heads';
import { counted } from '../../lib/formats';
import { FrameDownloads } from './frame-downloads';
import { FramePreview } from './frame-preview';
import { FrameStiffness } from './frame-stiffness';
import { FrameTable } from './frame-table';
import { ObjForm } from './obj-form';
import { ShapeForm } from './shape-form';

export type FramePageProps = {
  frame: FrameView;
  unit: LengthUnit;
  path: string;
  mayEdit: boolean;
  onChanged: () => unknown;
  onRemoved: () => unknown;
};

const usedWords = (pieces: number): string =>
  pieces === 0
    ? 'No piece is made from it yet.'
    : `${counted(pieces, 'piece')} ${pieces === 1 ? 'is' : 'are'} made from it.`;

/** One frame: its drawing and figures, or the form that changes it. */
export function FramePage({ frame, unit, path, mayEdit, onChanged, onRemoved }: FramePageProps) {
  const [form, setForm] = useState<'none' | 'source' | 'table'>('none');
  const editing = form !== 'none';
  const wish = { method: 'PUT', path: `${path}/${frame.id}` } as const;
  const shut = () => setForm('none');
  const done = async () => {
    await onChanged();
    shut();
  };
  const { source } = frame;
  return (
    <section className="grid gap-5" aria-labelledby="frame">
      <DimensionHead id="frame" right={usedWords(frame.subAssemblies)}>
        {frame.name}
      </DimensionHead>
      {editing && frame.subAssemblies > 0 && (
        <p className="max-w-words">
          Its pieces are drawn anew. Once work has begun on one of them only the name can change.
        </p>
      )}
      {form === 'source' && source.kind === 'shape' && (
        <ShapeForm
          unit={unit}
          wish={wish}
          words="Keep it"
          initial={{ name: frame.name, shape: source.shape, revision: frame.revision }}
          onDone={done}
          onCancel={shut}
        />
      )}
      {form === 'source' && (source.kind === 'obj' || source.kind === 'csv') && (
        <ObjForm
          unit={unit}
          wish={wish}
          words="Keep it"
          initial={{
            kind: source.kind,
            name: frame.name,
            fileName: source.fileName,
            geometry: frame.geometry,
            revision: frame.revision,
          }}
          onDone={done}
          onCancel={shut}
        />
      )}
      {form === 'table' && (
        <FrameTable
          unit={unit}
          wish={wish}
          initial={{ name: frame.name, geometry: frame.geometry, revision: frame.revision }}
          onDone={done}
          onCancel={shut}
        />
      )}
      {!editing && (
        <>
          <div className="flex flex-wrap items-center gap-x-6 gap-y-2">
            <span className="text-pencil">{sourceWords(source)}</span>
            {mayEdit && (
              <>
                {source.kind !== 'table' && (
                  <Action look="words" onClick={() => setForm('source')}>
                    Change
                  </Action>
                )}
                <Action look="words" onClick={() => setForm('table')}>
                  By numbers
                </Action>
                <ConfirmAction
                  words="Take out"
                  look="words"
                  title={`Take out the frame ${frame.name}?`}
                  confirm="Take it out"
                  wish={{ method: 'DELETE', path: wish.path }}
                  onDone={onRemoved}
                >
                  <p>
                    {usedWords(frame.subAssemblies)}{' '}
                    {frame.subAssemblies > 0
                      ? 'A frame can go when no piece is made from it; take those out first.'
                      : 'Its measures are gone then.'}
                  </p>
                </ConfirmAction>
              </>
            )}
            <FrameDownloads frame={frame.geometry} name={frame.name} />
          </div>
          <FramePreview frame={frame.geometry} unit={unit} name={frame.name} />
          <FrameStiffness frame={frame.geometry} unit={unit} />
        </>
      )}
    </section>
  );
}

function sourceWords(source: FrameView['source']): string {
  switch (source.kind) {
    case 'shape':
      return source.shape.kind.replace('-', ' ');
    case 'obj':
    case 'csv':
      return `From the file ${source.fileName}`;
    case 'table':
      return 'Typed joint by joint';
    case 'piece':
      return 'A pattern of the split';
  }
}
