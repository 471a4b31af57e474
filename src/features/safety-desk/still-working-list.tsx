import { Action } from '../../components/ui/action';
import { DimensionHead } from '../../components/ui/heads';
import { StateWord } from '../../components/ui/strut-glyph';
import { listed } from '../../lib/formats';
import { useLive, useLiveMap } from '../../lib/live';
import { ReasonAction } from './reason-dialog';
import { stepsToLookAfter, stillWords, type StepToLookAfter } from './still-working';
import type { Desk } from './use-desk';

/** Crews in hand whose sign-off ended meanwhile: not stopped, but somebody has to go there. */
export function StillWorking({ desk }: { desk: Desk }) {
  const live = useLive(desk.installationId, (state) => state);
  const found = live ? stepsToLookAfter(live, desk.at.now) : [];
  const crew = found.flatMap((one) => one.crew);
  const old = crew.length > 0 && crew.every(({ ended }) => ended !== null);
  return (
    <section aria-labelledby="still-working">
      <DimensionHead id="still-working">
        {old || crew.length === 0 ? 'Still working under an old version' : 'In hand without a sign-off'}
      </DimensionHead>
      {found.length === 0 ? (
        <p className="py-3 text-small text-pencil">
          Nobody. Everyone with a hazard step in hand is signed off for it.
        </p>
      ) : (
        <ul>
          {found.map((one) => (
            <StillWorkingStep key={one.step.id} desk={desk} found={one} />
          ))}
        </ul>
      )}
    </section>
  );
}

function StillWorkingStep({ desk, found: { step, piece, crew } }: { desk: Desk; found: StepToLookAfter }) {
  const { installationId, may, nameOf } = desk;
  const station = useLiveMap(installationId, 'stations').get(step.stationId)?.name ?? '';
  const code = piece?.code ?? '';
  const what = `${code} ${step.name}`;
  const [first] = crew;
  return (
    <li className="step-to-look-after">
      <p className="font-semibold">{listed(crew.map(({ name }) => name))}</p>
      <p className="text-small">
        {what}, {station}. {first?.ended ? `In hand when version ${first.ended.now} came. ` : ''}
        {!step.held && 'Not stopped: brief them where they stand, or hold the step.'}
      </p>
      <ul className="text-small">
        {crew.map((one) => (
          <li key={one.personId}>
            {one.name} {stillWords(one)}.
          </li>
        ))}
      </ul>
      {step.held && (
        <p>
          <StateWord state="held">held by {nameOf(step.held.by)}</StateWord>
          <span className="block text-small">{step.held.reason}</span>
        </p>
      )}
      <div className="flex flex-wrap gap-x-5">
        {!step.held && may('step.hold') && (
          <ReasonAction
            words={`Hold ${what}`}
            label={`Hold ${what}`}
            title={`Hold ${what}?`}
            ask="why it is held"
            confirm="Hold it"
            path={`/installations/${installationId}/steps/${step.id}/hold`}
          >
            <p>
              {listed(crew.map(({ name }) => name))} can go on with it only after a lead has released it. Tell
              them first: a gun stays hot.
            </p>
          </ReasonAction>
        )}
        <Action
          look="words"
          to={`/i/${installationId}/travellers?piece=${encodeURIComponent(code)}&open=${encodeURIComponent(code)}`}
        >
          Show {code} on the board
        </Action>
      </div>
    </li>
  );
}
