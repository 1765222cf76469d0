'use client';

/** Stands alone: it replaces the root layout when that fails. */
export default function GlobalError({ reset }: { error: Error; reset: () => void }) {
  return (
    <html lang="en">
      <body style={{ fontFamily: 'sans-serif', padding: '2rem', maxWidth: '32rem' }}>
        <h1>Lampwright did not load</h1>
        <p>Something went wrong on our side. Nothing you saved is lost.</p>
        <button onClick={reset} style={{ padding: '0.75rem 1rem' }}>
          Try again
        </button>
      </body>
    </html>
  );
}
