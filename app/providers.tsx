'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { setNonce } from 'get-nonce';
import { type ReactNode, useState } from 'react';

/** What every page shares in the browser: the query cache and the frozen nonce. */
export function Providers({ children, nonce }: { children: ReactNode; nonce: string | undefined }) {
  const [client] = useState(() => {
    // The document keeps the policy of its first load; a later payload brings a newer, useless nonce, so this runs once.
    // react-remove-scroll (dialogs and menus) writes <style> at run time and asks get-nonce for the nonce
    if (nonce) setNonce(nonce);
    return new QueryClient({ defaultOptions: { queries: { staleTime: 30_000, retry: 1 } } });
  });
  return <QueryClientProvider client={client}>{children}</QueryClientProvider>;
}
