import { useState } from 'react';
import { Action } from '../../components/ui/action';
import { CheckField, OptionStruts } from '../../components/ui/choices';
import { CodeField } from '../../components/ui/code-field';
import { Dialog } from '../../components/ui/dialog';
import { Field, SelectField, TextArea } from '../../components/ui/field';
import { ChoiceRow, DimensionHead, PageHead } from '../../components/ui/heads';
import { StateWord } from '../../components/ui/strut-glyph';
import { useThemeChoice } from '../../lib/theme';

/** Actions, fields, choices, a dialog. */
export function KitControls({ theme }: { theme: string }) {
  const [age, setAge] = useState<'18+' | '16-17' | '13-15' | null>('13-15');
  const [code, setCode] = useState('K7M2');
  const [tool, setTool] = useState<'turn' | 'move' | 'cut'>('move');
  const [open, setOpen] = useState(false);
  const [choice, choose] = useThemeChoice();
  return (
    <>
      <PageHead
        title="Kit"
        summary="38 travellers, 191 of 380 steps passed. Glue is the bottleneck."
        aside={
          <>
            <StateWord state="to check">3 to check</StateWord>
            <StateWord state="rework">2 rework</StateWord>
            <StateWord state="held">1 held</StateWord>
          </>
        }
      />
      <DimensionHead right="36, 48, 64">Actions</DimensionHead>
      <div className="flex flex-wrap items-center gap-6">
        <Action look="main" size="glove" detail="someone else checks it">
          Finished
        </Action>
        <Action size="glove">Give back</Action>
        <Action look="main" size="phone">
          Take
        </Action>
        <Action size="phone">Take back a tool</Action>
        <Action look="plain" size="desk">
          Leave them
        </Action>
        <Action look="words">Start again</Action>
        <Action disabled>Take</Action>
        <Action reason="Taking needs the network.">Take</Action>
        <Action
          onClick={() => {
            setOpen(true);
          }}
        >
          Open a dialog
        </Action>
        <Action
          look="plain"
          onClick={() => {
            choose(choice === 'night' ? 'paper' : 'night');
          }}
        >
          {`Theme: ${choice}`}
        </Action>
      </div>
      <Dialog
        open={open}
        onClose={() => {
          setOpen(false);
        }}
        title="Move 4 struts from V-05 to V-06?"
        actions={
          <>
            <Action
              look="plain"
              onClick={() => {
                setOpen(false);
              }}
            >
              Leave them
            </Action>
            <Action look="main">Move anyway</Action>
          </>
        }
      >
        <p>V-05 82 to 70 min. V-06 76 to 92 min: 2 over the limit of 90. 2 field joints more.</p>
      </Dialog>
      <DimensionHead>Fields</DimensionHead>
      <div className="grid items-start gap-6 desk:grid-cols-3">
        <Field label="first name" defaultValue="Yuki" />
        <Field label="longest side" defaultValue="3 000" unit="mm" />
        <Field
          label="crew"
          defaultValue="0"
          unit="people"
          error="At least 1, please. A step needs somebody."
        />
        <SelectField label="station" defaultValue="glue 2">
          <option>bench 1</option>
          <option>glue 2</option>
        </SelectField>
        <TextArea label="reason" optional hint="What the next person has to know." />
        <CodeField label="code on the poster" value={code} onChange={setCode} />
        <OptionStruts
          legend="age band"
          columns={2}
          value={age}
          onChange={setAge}
          options={[
            { value: '18+', label: 'adult' },
            { value: '16-17', label: '16 to 17', detail: 'low ladder only' },
            { value: '13-15', label: '13 to 15' },
          ]}
        />
        <div className="grid">
          <CheckField defaultChecked>Kofi A, any gun</CheckField>
          <CheckField>{`Yuki T, ${theme}`}</CheckField>
          <CheckField error="Please tick it when you have read the text.">I have read it</CheckField>
        </div>
        <ChoiceRow
          label="Tool"
          value={tool}
          onChange={setTool}
          choices={[
            { value: 'turn', label: 'Turn' },
            { value: 'move', label: 'Move struts' },
            { value: 'cut', label: 'Cut in two' },
          ]}
        />
      </div>
    </>
  );
}
