'use client';

import { QueryClient, QueryClientProvider } from '@tanstack/react-query';
import { setNonce } from 'get-nonce';
import { createContext, type ReactNode, useContext, useState } from 'react';

const NonceContext = createContext<string | undefined>(undefined);

/** The nonce of this document's content policy, for the few components that write a style element. */
export const useNonce = (): string | undefined => useContext(NonceContext);

/** What every page shares in the browser: the query cache and the frozen nonce. */
export function Providers({ children, nonce }: { children: ReactNode; nonce: string | undefined }) {
  // The document keeps the policy of its first load; a later payload brings this layout a newer, useless nonce.
  const [documentNonce] = useState(nonce);
  const [client] = useState(() => {
    // react-remove-scroll (dialogs and menus) writes <style> at run time and asks get-nonce for the nonce
    if (nonce) setNonce(nonce);
    return new QueryClient({ defaultOptions: { queries: { staleTime: 30_000, retry: 1 } } });
  });
  return (
    <NonceContext value={documentNonce}>
      <QueryClientProvider client={client}>{children}</QueryClientProvider>
    </NonceContext>
  );
}
