import { buildShape } from '../../../shared/frames/shapes';
import { DeskFrame } from '../../components/layout/desk-frame';
import type { NavItem } from '../../components/layout/nav-item';
import { PhoneFrame } from '../../components/layout/phone-frame';
import { ProjectorFrame, WallLine } from '../../components/layout/projector-frame';
import { Action } from '../../components/ui/action';
import { DayRuler } from '../../components/ui/day-ruler';
import { Figures } from '../../components/ui/figures';
import { PlumbLine } from '../../components/ui/gauge';
import { DimensionHead, PageHead } from '../../components/ui/heads';
import { Note } from '../../components/ui/note';
import { StateWord } from '../../components/ui/strut-glyph';
import { GLYPH_STATES } from '../../components/ui/strut-geometry';
import { StopBanner } from '../../components/ui/stop-banner';
import { UnrolledDrawing } from '../../components/ui/unrolled-drawing';
import { en } from '../../lib/messages/en';

const ITEMS: NavItem[] = [
  { to: '/kit/a', label: 'Frames', group: 'Before' },
  { to: '/kit/b', label: 'Sub-assemblies', group: 'Before' },
  { to: '/kit', label: 'Travellers', group: 'On the day' },
  { to: '/kit/g', label: 'My bench', group: 'On the day' },
  { to: '/kit/c', label: 'Crib', group: 'On the day' },
  { to: '/kit/wall', label: 'Projector', group: 'On the day' },
  { to: '/kit/d', label: 'Day log', group: 'After' },
];

const ruler = (
  <DayRuler
    doors="09:00"
    start="09:30"
    clearUp="17:30"
    end="18:30"
    breaks={[
      { from: '11:00', to: '11:15', label: 'break' },
      { from: '12:30', to: '13:15', label: 'lunch' },
    ]}
    now="14:07"
  />
);

const piece = buildShape({
  kind: 'vault-bay',
  lengthMm: 1000,
  widthMm: 2841,
  riseMm: 0,
  divisionsAlong: 2,
  divisionsAcross: 4,
  diagonals: 'staggered',
});

/** The desk's frame with a page in it. */
export function KitDesk() {
  return (
    <DeskFrame
      items={ITEMS}
      ruler={ruler}
      titleBlock={{
        installation: 'Pump Hall Canopy',
        day: 'day 2 of 2, Sat 14 June',
        revision: 1842,
        link: { live: true },
        who: 'Lena W, safety lead',
      }}
    >
      <PageHead
        title="Travellers"
        summary="38 travellers, 191 of 380 steps passed."
        aside={<StateWord state="to check">3 to check</StateWord>}
      />
      <DimensionHead right="18 rows">Sheet</DimensionHead>
    </DeskFrame>
  );
}

/** The phone's frame with a page in it. */
export function KitPhone() {
  return (
    <PhoneFrame
      title={en.bench.title}
      who="Wren S"
      link={{ live: true }}
      linkWords={{ live: en.common.link.live('14:07'), broken: en.common.link.broken }}
      ruler={ruler}
      items={[
        { to: '/kit', label: en.common.screens.bench },
        { to: '/kit/e', label: en.common.screens.briefings },
        { to: '/kit/f', label: en.common.screens.call },
      ]}
    >
      <section className="grid gap-3">
        <DimensionHead right={<StateWord state="in hand" />}>{en.bench.inHand}</DimensionHead>
        <p className="text-t3">
          <strong>V-09</strong> <span className="text-t2 font-light">glue out</span>
        </p>
        <p>{en.bench.place('glue 3', ['Kofi A'])}</p>
        <UnrolledDrawing frame={piece} unit="mm" label="V-09" glued={new Set([1, 2, 3, 7, 8])} />
        <div className="grid grid-cols-[3fr_2fr] gap-5">
          <Action look="main" size="glove" wide detail={en.bench.someoneChecks}>
            {en.bench.finished}
          </Action>
          <Action size="glove" wide>
            {en.bench.giveBack}
          </Action>
        </div>
      </section>
      <Note kind="taken" title={en.bench.lost.title('Yara Q')}>
        {en.bench.lost.text('L-15 glue out', 1, 'Yara Q', '14:07:31')} {en.bench.lost.still(['V-09'])}
      </Note>
    </PhoneFrame>
  );
}

/** The projector's frame, live, with old news, and stopped. */
export function KitWall({ as }: { as: 'wall' | 'wall-stop' | 'wall-stale' }) {
  return (
    <ProjectorFrame
      title="Pump Hall Canopy"
      time="14:07"
      share={0.5}
      stale={as === 'wall-stale' ? 'no news since 14:03' : undefined}
      picture={
        <svg viewBox="0 0 1220 810" width="100%" height="100%" aria-hidden="true">
          <PlumbLine x={186} from={270} to={760} code="L-03" fontSize={48} />
          <PlumbLine x={420} from={350} to={760} code="L-15" fontSize={48} />
        </svg>
      }
      legend={GLYPH_STATES.map((state) => (
        <StateWord key={state} state={state} height={40} />
      ))}
      column={
        <>
          <p>hands wanted</p>
          <WallLine figure={<Figures>2</Figures>} detail="lay out, bench 5">
            V-14
          </WallLine>
          <WallLine figure={<Figures>1</Figures>} detail="glue out, glue 3">
            L-15
          </WallLine>
        </>
      }
      stop={
        as === 'wall-stop' && (
          <StopBanner
            size="wall"
            word={en.stop.word}
            scope="hot tools"
            since={en.stop.since('14:07')}
            what={en.stop.what('Smoke at glue 2.', 'Lena W', 'all hot tools')}
            steps={en.stop.makeSafe['hot-tools']}
            foot={en.stop.otherWork}
          />
        )
      }
    />
  );
}
