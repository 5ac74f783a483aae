import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { Button } from '../components/button.tsx';
import { Notice } from '../components/notice.tsx';

/** What a page shows when drawing it failed: what happened, and how to go on. */
export function ErrorPage() {
  const error = useRouteError();
  return (
    <section className="px-[24px] py-[48px] max-w-[70ch]">
      <h1>This page could not be drawn</h1>
      <div className="my-[16px]">
        <Notice kind="stop">{sentenceOf(error)}</Notice>
      </div>
      <p className="mb-[16px] text-ink2">
        Inputs kept in this browser are still there. Load the page again; if it fails in the same way, start from an
        example.
      </p>
      <Button onClick={() => window.location.reload()}>Load again</Button>
    </section>
  );
}

function sentenceOf(error: unknown): string {
  if (isRouteErrorResponse(error)) return `${error.status} ${error.statusText}`;
  if (isMissingBundle(error)) return 'The server was not reached, or it has a newer version of this page since.';
  return error instanceof Error ? error.message : String(error);
}

/** Each browser, and the loader of the bundles, has its own words for one that did not come. */
function isMissingBundle(error: unknown): boolean {
  const words = /dynamically imported module|importing a module script|unable to preload/i;
  return error instanceof Error && words.test(error.message);
}
