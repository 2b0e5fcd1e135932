import { Link } from 'react-router-dom';
import { appText, wording } from '#shared/text/en/app.ts';
import { buttonLook } from '../ui/button.tsx';

/** Nothing here, or nothing for this reader: the same words, so that neither can be told from the other. */
export function NotFound() {
  return (
    <section className="mx-auto w-full max-w-xl px-6 py-16">
      <h1 className="type-title text-3xl">{appText.notFound}</h1>
      <p className="mt-3 mb-6 text-dim">{appText.notFoundMore}</p>
      <Link to="/" className={buttonLook({ kind: 'primary' })}>
        {wording.toFloor}
      </Link>
    </section>
  );
}
