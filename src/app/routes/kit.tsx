import { useParams } from 'react-router-dom';
import { Pending } from '../../components/ui/pending';
import { KitControls } from './kit-controls';
import { KitDesk, KitPhone, KitWall } from './kit-frames';
import { KitMarks } from './kit-marks';
import { KitPanels } from './kit-panels';

/** While developing: every component in both themes, and the frames by themselves at /kit/desk, /kit/phone, /kit/wall. */
export function Kit() {
  const { '*': part } = useParams();
  if (part === 'desk') return <KitDesk />;
  if (part === 'phone') return <KitPhone />;
  if (part === 'wall' || part === 'wall-stop' || part === 'wall-stale') return <KitWall as={part} />;
  return (
    <main id="main">
      <h1 className="page-title p-5">The kit</h1>
      {(['paper', 'night'] as const).map((theme) => (
        <section key={theme} data-theme={theme} aria-label={theme} className="grid gap-10 p-5 desk:p-10">
          <KitMarks theme={theme} />
          <KitControls theme={theme} />
          <KitPanels />
          <Pending />
        </section>
      ))}
    </main>
  );
}
