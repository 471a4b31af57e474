import { useSearchParams } from 'react-router-dom';
import { Pending } from '../../components/ui/pending';
import { KitControls } from './kit-controls';
import { KitDesk, KitPhone, KitWall } from './kit-frames';
import { KitMarks } from './kit-marks';
import { KitPanels } from './kit-panels';

/** While developing: every component in both themes, and the frames by themselves as ?part=desk, phone, wall, wall-stop and wall-stale. */
export function Component() {
  const [search] = useSearchParams();
  const part = search.get('part');
  if (part === 'desk') return <KitDesk />;
  if (part === 'phone') return <KitPhone />;
  if (part === 'wall' || part === 'wall-stop' || part === 'wall-stale') return <KitWall as={part} />;
  return (
    <main id="main">
      <h1 className="page-title p-5">The kit</h1>
      {(['paper', 'night'] as const).map((theme) => (
        <section
          key={theme}
          data-theme={theme}
          aria-label={theme}
          className="grid grid-cols-[minmax(0,1fr)] gap-10 p-5 desk:p-10"
        >
          <KitMarks theme={theme} />
          <KitControls theme={theme} />
          <KitPanels />
          <Pending />
        </section>
      ))}
    </main>
  );
}
