import type { Browser, Page } from '@playwright/test';

/** Tasks over 50 ms (the browser's own measure of one that can be felt) since the last call, in milliseconds. */
export async function longTasks(page: Page): Promise<number[]> {
  return page.evaluate(() => {
    const kept = (globalThis as unknown as { longTasks: number[] }).longTasks;
    return kept.splice(0);
  });
}

/** Counts them from the first script of the page on. */
export async function watchLongTasks(page: Page): Promise<void> {
  await page.addInitScript(() => {
    const kept: number[] = [];
    Object.assign(globalThis, { longTasks: kept });
    new PerformanceObserver((list) => {
      for (const entry of list.getEntries()) kept.push(entry.duration);
    }).observe({ type: 'longtask', buffered: true });
  });
}

interface TraceEvent {
  readonly name: string;
  readonly ph: string;
  readonly pid: number;
  readonly tid: number;
  readonly ts: number;
  readonly dur?: number;
  /** Of the duration, what the thread itself ran. */
  readonly tdur?: number;
  readonly id?: string;
  readonly args: Record<string, unknown>;
}

interface Chunk {
  readonly cpuProfile?: {
    readonly nodes?: readonly Node[];
    readonly samples?: readonly number[];
  };
  readonly timeDeltas?: readonly number[];
}

interface Node {
  readonly id: number;
  readonly parent?: number;
  readonly callFrame: { readonly functionName: string; readonly url?: string; readonly lineNumber?: number };
}

const CATEGORIES = [
  'devtools.timeline',
  'disabled-by-default-devtools.timeline',
  'disabled-by-default-v8.cpu_profiler',
];

/** Records a page; `stop` tells its long tasks with the functions in which most of their time went. */
export async function traceTasks(browser: Browser, page: Page): Promise<{ stop(): Promise<string[]> }> {
  await browser.startTracing(page, { categories: CATEGORIES });
  // The profiler lists all code that is there with the first task that it sees: that task is nobody's.
  await page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 300)));
  await longTasks(page).catch(() => []);
  return {
    stop: async () => {
      const text = (await browser.stopTracing()).toString('utf8');
      return taskLines((JSON.parse(text) as { traceEvents: TraceEvent[] }).traceEvents);
    },
  };
}

function taskLines(events: readonly TraceEvent[]): string[] {
  const mains = new Set(
    events
      .filter((e) => e.name === 'thread_name' && e.args.name === 'CrRendererMain')
      .map((e) => `${e.pid} ${e.tid}`),
  );
  const tasks = events.filter(
    (e) => e.name === 'RunTask' && mains.has(`${e.pid} ${e.tid}`) && (e.dur ?? 0) > 50_000,
  );
  const samples = samplesOf(events.filter((e) => e.name !== 'Profile' || mains.has(`${e.pid} ${e.tid}`)));
  return tasks.map((task) => {
    const end = task.ts + task.dur!;
    const inside = (at: number) => at >= task.ts && at <= end;
    const self = new Map<string, number>();
    const whole = new Map<string, number>();
    for (const { pid, at, spent, stack } of samples) {
      if (pid !== task.pid || !inside(at)) continue;
      self.set(stack[0]!, (self.get(stack[0]!) ?? 0) + spent);
      for (const name of new Set(stack)) whole.set(name, (whole.get(name) ?? 0) + spent);
    }
    // What the browser itself did: layout, painting, garbage.
    for (const e of events) {
      if (e.pid !== task.pid || e.tid !== task.tid || e === task || e.name === 'RunTask') continue;
      if (inside(e.ts) && (e.dur ?? 0) > 3000)
        whole.set(`<${e.name}>`, (whole.get(`<${e.name}>`) ?? 0) + e.dur!);
    }
    const top = (map: Map<string, number>, n: number) =>
      [...map]
        .sort((a, b) => b[1] - a[1])
        .slice(0, n)
        .map(([name, spent]) => `${name} ${Math.round(spent / 1000)}`)
        .join(', ');
    const [wall, ran] = [task.dur!, task.tdur ?? task.dur!].map((micro) => Math.round(micro / 1000));
    return `${wall} ms (${ran} of the processor); own: ${top(self, 5)}; with what they call: ${top(whole, 16)}`;
  });
}

/** Samples of the profiles that begin among the events, each with the names from the innermost function outward. */
function samplesOf(events: readonly TraceEvent[]) {
  const out: { pid: number; at: number; spent: number; stack: string[] }[] = [];
  const profiles = new Map<string, { at: number; nodes: Map<number, Node> }>();
  for (const e of events) {
    const key = `${e.pid} ${e.id}`;
    if (e.name === 'Profile') {
      const { startTime } = e.args.data as { startTime: number };
      profiles.set(key, { at: startTime, nodes: new Map() });
    }
    const profile = profiles.get(key);
    if (e.name !== 'ProfileChunk' || !profile) continue;
    const { cpuProfile, timeDeltas } = e.args.data as Chunk;
    for (const node of cpuProfile?.nodes ?? []) profile.nodes.set(node.id, node);
    for (const [i, id] of (cpuProfile?.samples ?? []).entries()) {
      const spent = timeDeltas?.[i] ?? 0;
      profile.at += spent;
      const stack: string[] = [];
      for (
        let n = profile.nodes.get(id);
        n;
        n = n.parent === undefined ? undefined : profile.nodes.get(n.parent)
      )
        stack.push(n.callFrame.functionName || `line ${n.callFrame.lineNumber}`);
      out.push({ pid: e.pid, at: profile.at, spent, stack });
    }
  }
  return out;
}
