/** Seconds that one call of run(k) takes, k counting up, after warming up. */
export function secondsACall(run) {
  for (let k = 0; k < 200; k += 1) run(k);
  let calls = 1;
  for (;;) {
    const begin = performance.now();
    for (let k = 0; k < calls; k += 1) run(k);
    const seconds = (performance.now() - begin) / 1000;
    if (seconds > 0.2) return seconds / calls;
    calls = Math.ceil(calls * Math.min(10, 0.25 / Math.max(seconds, 1e-4)));
  }
}
