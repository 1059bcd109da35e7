'use client';

/** When not even the outermost layout could be made, so none of our styles can be counted on. */
export default function GlobalError({ reset }: { error: Error & { digest?: string }; reset: () => void }) {
  return (
    <html lang="en">
      <body
        style={{ fontFamily: 'system-ui, sans-serif', padding: '2rem', maxWidth: '40rem', margin: 'auto' }}
      >
        <title>Middenward</title>
        <h1>Middenward cannot show its pages just now.</h1>
        <p>
          The relays are run by another process and go on by their rules. If that has stopped too, each relay
          falls to its safe state within 30 s by itself.
        </p>
        <button type="button" onClick={reset} style={{ minHeight: 44, padding: '0 1rem' }}>
          Try again
        </button>
      </body>
    </html>
  );
}
