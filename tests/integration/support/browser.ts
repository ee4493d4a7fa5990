// Stands for next/headers outside Next.js: the cookies and headers of the browser whose turn it is.

interface StoredCookie {
  readonly value: string;
  readonly attributes: Record<string, unknown>;
}

/** One person's browser. */
export class Browser {
  readonly cookies = new Map<string, StoredCookie>();

  constructor(
    readonly address = '198.51.100.7',
    readonly userAgent = 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0',
  ) {}
}

let current = new Browser();

/** Runs calls as this browser. */
export async function inBrowser<T>(browser: Browser, run: () => Promise<T>): Promise<T> {
  const before = current;
  current = browser;
  try {
    return await run();
  } finally {
    current = before;
  }
}

/** What next/headers gives to the code under test. */
export const nextHeaders = {
  cookies: async () => ({
    get: (name: string) => {
      const cookie = current.cookies.get(name);
      return cookie?.value ? { name, value: cookie.value } : undefined;
    },
    set: (name: string, value: string, attributes: Record<string, unknown>) => {
      current.cookies.set(name, { value, attributes });
    },
  }),
  headers: async () => new Headers({ 'user-agent': current.userAgent, 'x-forwarded-for': current.address }),
};
