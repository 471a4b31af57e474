import type { Hazard } from '../../../shared/safety';
import type { Refusal } from '../../../shared/travellers';
import type { BenchEntry } from '../../../shared/travellers/bench';
import { shownState } from '../../../shared/travellers/step';
import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { StateGlyph } from '../../components/ui/strut-glyph';
import { useLiveMap } from '../../lib/live';
import { useMessages } from '../../lib/messages';
import type { BenchNames } from './names';

type Entry = BenchEntry & { refusal: Refusal };

/** Steps with the same reason are told once: what changes it changes it for all of them. */
function grouped(entries: readonly Entry[], names: BenchNames): { text: string; entries: Entry[] }[] {
  const groups = new Map<string, { text: string; entries: Entry[] }>();
  for (const entry of entries) {
    const { code, details } = entry.refusal;
    const text = names.refusal(entry.refusal, entry.step);
    // Held and racing steps have their own story each; gates of the person are the same for all.
    const key =
      code === 'SIGN_OFF_MISSING' || code === 'AGE_RULE' ? `${code} ${String(details.hazard)}` : text;
    const group = groups.get(key);
    if (group) group.entries.push(entry);
    else groups.set(key, { text, entries: [entry] });
  }
  return [...groups.values()];
}

/** Everything that is open and not for me yet: the reason, and the way to change it. */
export function NotYet({
  entries,
  names,
  installationId,
}: {
  entries: readonly Entry[];
  names: BenchNames;
  installationId: string;
}) {
  const { bench: words } = useMessages();
  if (entries.length === 0) return null;
  return (
    <section aria-labelledby="bench-not-yet">
      <DimensionHead id="bench-not-yet" right={words.notYetCount(entries.length)}>
        {words.notYet}
      </DimensionHead>
      <ul>
        {grouped(entries, names).map((group) => (
          <Reason
            key={group.entries[0]?.step.id}
            group={group}
            names={names}
            installationId={installationId}
          />
        ))}
      </ul>
    </section>
  );
}

function Reason({
  group,
  names,
  installationId,
}: {
  group: { text: string; entries: Entry[] };
  names: BenchNames;
  installationId: string;
}) {
  const { bench: words, refusals, common } = useMessages();
  const briefings = useLiveMap(installationId, 'briefings');
  const [first] = group.entries;
  if (!first) return null;
  const { step, refusal } = first;
  const hazard = refusal.code === 'SIGN_OFF_MISSING' ? (refusal.details.hazard as Hazard) : null;
  const briefing = hazard ? [...briefings.values()].find((one) => one.hazards.includes(hazard)) : undefined;
  const waitsForLead =
    refusal.details.missing === 'NOT_COUNTERSIGNED' || refusal.details.missing === 'TALK_NEEDED';
  const more = group.entries.length - 1;
  return (
    <li className="grid grid-cols-[3.5rem_1fr] gap-3 border-b border-rule py-4">
      <StateGlyph state={shownState(step)} />
      <div>
        <h3 className="bench-what">
          <strong>{names.codeOf(step)}</strong> {step.name}
          {more > 0 && <span className="text-pencil"> {words.andMore(more)}</span>}
        </h3>
        <p>{group.text}</p>
        {hazard && briefing && !waitsForLead && (
          <Action look="words" size="phone" to={`/i/${installationId}/briefings/${briefing.key}`}>
            {refusals.SIGN_OFF.read(common.hazards[hazard])}
          </Action>
        )}
      </div>
    </li>
  );
}
