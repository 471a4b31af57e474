import { Action } from '../../components/ui/action';
import { BeeMark } from '../../components/ui/bee-mark';
import { usePageTitle } from '../../lib/page-title';

/** An unknown address, and one that this person may not see: both look the same. */
export function Component() {
  usePageTitle('Not found');
  return (
    <main id="main" className="mx-auto grid max-w-words gap-4 p-5">
      <p className="flex items-center gap-3">
        <BeeMark /> Strutbee
      </p>
      <h1 className="page-title">There is nothing here for you.</h1>
      <p>
        The address may be mistyped, what stood here may be gone, or it is not for you to see. Ask whoever
        gave you the address, or start at the beginning.
      </p>
      <p>
        <Action look="main" href="/">
          Go to the start
        </Action>
      </p>
    </main>
  );
}
