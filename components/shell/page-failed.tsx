'use client';
import { buttonLook } from '@/components/ui/button-look';
import { Failed } from '@/components/ui/states';

/** What a page shows in place of itself when it could not be made. The relays are the worker's, which is not touched. */
export function PageFailed({ digest, retry }: { digest: string | undefined; retry: () => void }) {
  return (
    <div className="mx-auto max-w-2xl pt-6">
      <h1 className="sr-only">This page could not be shown</h1>
      <Failed
        title="This page could not be shown."
        action={
          <>
            {/* plain ones: this comes with every page, and after a failure a whole load is the surer way */}
            <button type="button" onClick={retry} className={buttonLook('primary')}>
              Try again
            </button>
            <a href="/" className={buttonLook('plain')}>
              Go to Watch
            </a>
          </>
        }
      >
        <p>
          The database or the web server did not answer in time. Relays are run by another process: rules,
          rests and hand commands go on. If even that has stopped, every relay falls to its safe state within
          30 s by itself.
        </p>
        <p className="mt-2">
          Wait a moment and try again.
          {digest === undefined ? null : <> It stands in the server’s log as {digest}.</>}
        </p>
      </Failed>
    </div>
  );
}
