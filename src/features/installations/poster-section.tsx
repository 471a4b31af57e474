import type { InstallationRecord } from '../../../shared/contracts/live';
import { Action } from '../../components/ui/action';
import { BeeMark } from '../../components/ui/bee-mark';
import { BigCode } from '../../components/ui/big-code';
import { DimensionHead } from '../../components/ui/heads';
import { formatCalendarDay } from '../../lib/formats';
import { useJoinCode } from '../../lib/join-code';
import { useLiveMap } from '../../lib/live';
import { standing } from './standing';

/** The poster as it is printed: one sheet with the code and the address. */
export function PosterSection({ installation }: { installation: InstallationRecord }) {
  const { id, name, venue } = installation;
  const code = useJoinCode(id);
  const days = standing(useLiveMap(id, 'buildDays'), (a, b) => a.date.localeCompare(b.date));
  if (!code.data) return null;
  const bare = code.data.joinUrl.replace(/^https?:\/\//, '').replace(/\/[^/]*$/, '');
  return (
    <section className="grid gap-4" aria-labelledby="poster">
      <DimensionHead id="poster">Poster</DimensionHead>
      <div>
        <Action onClick={() => window.print()}>Print the poster</Action>
      </div>
      <article className="poster" aria-label="The poster as it is printed">
        <p className="poster-brand">
          <BeeMark height={30} /> Strutbee
        </p>
        <p className="poster-title">{name}</p>
        <p>
          {[venue, ...days.map((day) => `${formatCalendarDay(day.date)}, doors ${day.doors}`)]
            .filter(Boolean)
            .join(' · ')}
        </p>
        <p className="poster-ask">Help build it. On your phone, open</p>
        <p className="poster-address">{bare}</p>
        <p className="poster-ask">and type this code:</p>
        <BigCode code={code.data.joinCode} />
        <p>
          No account, no password. Under a minute. Then come to the muster desk.
          <br />
          Or open {code.data.joinUrl}
        </p>
      </article>
    </section>
  );
}
