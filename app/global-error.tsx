'use client';

import { useEffect } from 'react';

// The last resort: the layout itself failed, so neither its styles nor its typefaces can be relied on.
export default function GlobalError({
  error,
  reset,
}: {
  error: Error & { digest?: string };
  reset: () => void;
}) {
  useEffect(() => {
    console.error(error);
  }, [error]);
  return (
    <html lang="en">
      <body
        style={{
          background: '#f3f5f1',
          color: '#17263a',
          font: '1.05rem/1.5 system-ui, sans-serif',
          margin: '12vh 8vw',
        }}
      >
        <title>Underfall</title>
        <h1 style={{ fontWeight: 500 }}>Underfall could not answer</h1>
        <p>Something failed on our side. Nothing that was kept is lost. Try again in a moment.</p>
        {error.digest && <p>Reference: {error.digest}</p>}
        <button type="button" onClick={reset} style={{ font: 'inherit', padding: '0.5rem 1rem' }}>
          Try again
        </button>
      </body>
    </html>
  );
}
