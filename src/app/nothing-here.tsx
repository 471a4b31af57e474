import { PageHead } from '../components/ui/heads';

/** In place of a page that this person may not see; it says no more than an unknown address does. */
export function NothingHere() {
  return (
    <>
      <PageHead title="There is nothing here for you." />
      <p className="max-w-words">
        The address may be mistyped, what stood here may be gone, or it is not for you to see. Ask whoever
        gave you the address.
      </p>
    </>
  );
}
