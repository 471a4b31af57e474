import { useEffect, useRef, useState } from 'react';
import type { AgeLimit } from '../../../shared/safety/age-rules';
import type { PersonRecord, ToolRecord } from '../../../shared/contracts/live';
import { decideLend } from '../../../shared/crib/decide-lend';
import { Action } from '../../components/ui/action';
import { SelectField } from '../../components/ui/field';
import { ChoiceRow } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { Refusal } from '../../components/ui/refusal';
import { useLive, useLiveMap } from '../../lib/live';
import type { LiveState } from '../../lib/live-state';
import { useSend } from '../../lib/use-send';
import { houseRules, personFacts } from '../../lib/world';
import { BACK_BY, BACK_BY_WORDS, backByMinutes, timeWords, type BackBy } from './back-by';
import { lendWords, limitWords, type LendWords } from './lend-words';
import { looksLikeTool, personOffer, personProblem, readPerson, readTool, toolProblem } from './scan';
import { ScanField } from './scan-field';
import { PersonRead, ToolRead } from './scan-read';
import { ScanStrut, type ScanState } from './scan-strut';
import { TakenBack, useTakeBack } from './take-back';
import type { Crib } from './use-crib';

interface Lent {
  tool: ToolRecord;
  person: PersonRecord;
  backBy: number;
  limits: readonly AgeLimit[];
}

const whole = (state: LiveState) => state;

/** Out in two scans: the person, then the tool. */
export function LendDesk({ installationId, crib }: { installationId: string; crib: Crib }) {
  const live = useLive(installationId, whole);
  const stations = useLiveMap(installationId, 'stations');
  const [typedPerson, setTypedPerson] = useState('');
  const [typedTool, setTypedTool] = useState('');
  const [personId, setPersonId] = useState<string | null>(null);
  const [toolId, setToolId] = useState<string | null>(null);
  const [wrong, setWrong] = useState<{ field: 'person' | 'tool'; words: string } | null>(null);
  const [backBy, setBackBy] = useState<BackBy>('60');
  const [stationId, setStationId] = useState('');
  const [lent, setLent] = useState<Lent | null>(null);
  const personField = useRef<HTMLInputElement>(null);
  const toolField = useRef<HTMLInputElement>(null);
  const takeBack = useTakeBack(installationId, crib);
  const lend = useSend<{ backBy: number; limits: readonly AgeLimit[] }>();

  // A scanner types wherever the focus is: it waits in the first field.
  useEffect(() => personField.current?.focus({ preventScroll: true }), []);

  const person = personId === null ? undefined : crib.people.get(personId);
  const tool = crib.tools.find(({ id }) => id === toolId);
  const choices = BACK_BY.filter((choice) => backByMinutes(choice, crib.day, crib.now, crib.zone) !== null);
  const due = choices.includes(backBy) ? backBy : '60';

  const clear = () => {
    setTypedPerson('');
    setTypedTool('');
    setPersonId(null);
    setToolId(null);
    setWrong(null);
    // The next tool goes along with its person again, not to the last one's station.
    setStationId('');
    lend.reset();
    personField.current?.focus();
  };
  const forgetTool = () => {
    setTypedTool('');
    setToolId(null);
    lend.reset();
  };
  const refusalFor = (who: PersonRecord, what: ToolRecord): LendWords | null => {
    if (!live) return null;
    const facts = personFacts(live, who.id, crib.now);
    const decision = decideLend({
      tool: what,
      out: crib.outOf.get(what.id) ?? null,
      person: {
        confirmed: who.confirmed,
        onSite: who.onSite,
        ageBand: facts.ageBand,
        missing: facts.missing,
      },
      stationId: stationId || null,
      ...houseRules(live),
    });
    if (decision.ok) return null;
    return lendWords(decision.refusal, { ...crib, tool: what, person: who });
  };
  const send = (who: PersonRecord, what: ToolRecord) => {
    if (lend.isPending || refusalFor(who, what)) return;
    lend.mutate(
      {
        method: 'POST',
        path: `/installations/${installationId}/tools/${what.id}/lend`,
        body: {
          personId: who.id,
          stationId: stationId || null,
          minutes: backByMinutes(due, crib.day, crib.now, crib.zone) ?? 60,
        },
      },
      {
        onSuccess: (reply) => {
          clear();
          setLent({ tool: what, person: who, backBy: reply.backBy, limits: reply.limits });
        },
      },
    );
  };

  const scanPerson = () => {
    setLent(null);
    takeBack.forget();
    if (typedPerson.trim() === '') return;
    const found = readPerson(typedPerson, crib.people.values());
    if (found) {
      setPersonId(found.id);
      setWrong(null);
      lend.reset();
      // The tool may have been scanned first.
      if (tool) send(found, tool);
      else toolField.current?.focus();
      return;
    }
    // A tool scanned where a person is awaited has come back: that needs no second scan.
    const returned = readTool(typedPerson, crib.tools);
    if (returned && crib.outOf.has(returned.id)) {
      takeBack.take(returned);
      clear();
      return;
    }
    setPersonId(null);
    if (returned) {
      // Scanned in the wrong order: the tool goes where it belongs, the person is still awaited.
      setTypedPerson('');
      setTypedTool(returned.number);
      setToolId(returned.id);
      setWrong(null);
      return;
    }
    setWrong({ field: 'person', words: personProblem(typedPerson, crib.people.values()) });
  };
  const scanTool = () => {
    if (typedTool.trim() === '') return;
    const found = readTool(typedTool, crib.tools);
    if (!found) {
      const other = readPerson(typedTool, crib.people.values());
      if (other && !looksLikeTool(typedTool)) {
        // The next person has stepped up.
        setPersonId(other.id);
        setTypedPerson(String(other.number));
        setTypedTool('');
        setToolId(null);
        setWrong(null);
        return;
      }
      setToolId(null);
      setWrong({
        field: 'tool',
        words: toolProblem(typedTool),
      });
      return;
    }
    setToolId(found.id);
    setWrong(null);
    lend.reset();
    if (person) send(person, found);
    else personField.current?.focus();
  };

  const refusal = person && tool ? refusalFor(person, tool) : null;
  const state: ScanState = refusal
    ? 'refused'
    : person && tool
      ? 'both'
      : person
        ? 'person'
        : lent
          ? 'done'
          : 'none';
  return (
    <section aria-label="Lend a tool" className="lend">
      <ScanStrut state={state} />
      <div className="lend-scans">
        <div>
          <ScanField
            ref={personField}
            label="1 scan the person"
            value={typedPerson}
            enter="next"
            error={wrong?.field === 'person' ? wrong.words : undefined}
            list="crib-people"
            hint={
              person
                ? undefined
                : tool
                  ? `Now who takes ${tool.number}; then Enter.`
                  : 'Their number or name; then Enter.'
            }
            onChange={(typed) => {
              setTypedPerson(typed);
              setPersonId(null);
              // Somebody else after a refusal: the tool that was refused must not go out with them unasked.
              if (person && tool) forgetTool();
            }}
            onScan={scanPerson}
          />
          <datalist id="crib-people">
            {[...crib.people.values()]
              .filter((one) => one.onSite && !one.removed)
              .map((one) => (
                <option key={one.id} value={personOffer(one)} />
              ))}
          </datalist>
          {person && <PersonRead person={person} crib={crib} live={live} />}
        </div>
        <div>
          <ScanField
            ref={toolField}
            label="2 scan the tool"
            value={typedTool}
            enter="go"
            capitals
            error={wrong?.field === 'tool' ? wrong.words : undefined}
            hint={tool ? undefined : 'Its number, such as G-07; then Enter.'}
            onChange={(typed) => {
              setTypedTool(typed);
              setToolId(null);
            }}
            onScan={scanTool}
          />
          {tool && <ToolRead tool={tool} />}
        </div>
      </div>
      {refusal && (
        <Note
          kind="refused"
          title={refusal.title}
          actions={
            <Action look="words" onClick={clear}>
              Start again
            </Action>
          }
        >
          {refusal.text}
        </Note>
      )}
      <div className="lend-how">
        <div>
          <span className="field-label" aria-hidden="true">
            back by
          </span>
          <ChoiceRow
            label="Back by"
            choices={choices.map((value) => ({ value, label: BACK_BY_WORDS[value] }))}
            value={due}
            onChange={setBackBy}
          />
        </div>
        <SelectField
          label="where it goes"
          size="phone"
          value={stationId}
          onChange={(event) => setStationId(event.target.value)}
        >
          <option value="">with the person</option>
          {[...stations.values()]
            .filter((station) => !station.removed)
            .sort((a, b) => a.position - b.position)
            .map((station) => (
              <option key={station.id} value={station.id}>
                {station.name}, in their charge
              </option>
            ))}
        </SelectField>
      </div>
      {!refusal && person && tool && (
        <div className="lend-go">
          <Action size="phone" look="main" busy={lend.isPending} onClick={() => send(person, tool)}>
            Out with {person.name}
          </Action>
          <Action look="words" onClick={clear}>
            Start again
          </Action>
        </div>
      )}
      <Refusal error={lend.error} />
      {lent && (
        <Note
          kind="done"
          title={`${lent.tool.number} is out with ${lent.person.name}, back by ${timeWords(lent.backBy, crib.now, crib.zone)}.`}
        >
          {lent.limits.length > 0 && <p>{lent.limits.map(limitWords).join(' ')}</p>}
        </Note>
      )}
      <TakenBack takeBack={takeBack} />
    </section>
  );
}
