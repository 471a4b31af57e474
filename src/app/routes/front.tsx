import { BeeMark } from '../../components/ui/bee-mark';
import { usePageTitle } from '../../lib/page-title';
import { Action } from '../../components/ui/action';

/** The first page: sign in, or join with the poster's code. */
export function Front() {
  usePageTitle('Strutbee');
  return (
    <main id="main" className="mx-auto grid max-w-words gap-5 px-5 py-8">
      <h1 className="flex flex-wrap items-center gap-5 text-t5 font-light">
        <BeeMark height={38} /> Strutbee
      </h1>
      <p className="text-pencil">One large thing, made by many hands in a day.</p>
      <p>
        <Action look="main" to="/join" wide>
          Join with the code on the poster
        </Action>
      </p>
      <p>
        <Action look="words" to="/sign-in">
          Sign in with e-mail and password
        </Action>
      </p>
    </main>
  );
}
