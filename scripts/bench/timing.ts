/** Runs a few times to warm up, then seven times; the median in seconds with the last value. */
export function median<T>(run: () => T, counted = 7, warm = 5): { seconds: number; value: T } {
  for (let i = 0; i < warm; i++) run();
  const times: number[] = [];
  let value!: T;
  for (let i = 0; i < counted; i++) {
    const began = performance.now();
    value = run();
    times.push((performance.now() - began) / 1000);
  }
  return { seconds: quantile(times, 0.5), value };
}

export function quantile(values: readonly number[], q: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(q * sorted.length))]!;
}

export function peakMegabytes(): number {
  return Math.round(process.resourceUsage().maxRSS / 1024);
}

/** A stream of pseudo-random numbers in (0, 1), the same in every run. Park & Miller (1988), CACM 31:1192–1201. */
export function makeRandom(seed: number): () => number {
  let state = seed;
  return () => (state = (state * 48_271) % 2_147_483_647) / 2_147_483_647;
}
