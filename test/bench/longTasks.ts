import type { Browser, Page } from '@playwright/test';

/** A task of the page, in milliseconds: by the clock, and what its thread itself ran (the rest it waited for a core). */
export interface PageTask {
  readonly clockMs: number;
  readonly ownMs: number;
  /** The functions in which most of its time went, where stacks were asked for. */
  readonly stacks: string;
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

const CATEGORIES = ['devtools.timeline', 'disabled-by-default-devtools.timeline', 'blink.user_timing'];
const STACKS = 'disabled-by-default-v8.cpu_profiler';
const MARK = 'conewright-bench';

/** Records a page; `stop` tells its tasks of over so many milliseconds by the clock. */
export async function traceTasks(
  browser: Browser,
  page: Page,
  { stacks, overMs }: { readonly stacks: boolean; readonly overMs: number },
): Promise<{ stop(): Promise<PageTask[]> }> {
  await browser.startTracing(page, { categories: stacks ? [...CATEGORIES, STACKS] : CATEGORIES });
  // The profiler lists all code that is there with the first task that it sees: that task is nobody's.
  await page.evaluate(() => new Promise((resolve) => setTimeout(resolve, 300)));
  const from = await page.evaluate((name) => performance.mark(name).name, MARK);
  return {
    stop: async () => {
      // Once more: another page may stand in another process.
      await page.evaluate((name) => performance.mark(name).name, from);
      const text = (await browser.stopTracing()).toString('utf8');
      return tasksOf((JSON.parse(text) as { traceEvents: TraceEvent[] }).traceEvents, overMs);
    },
  };
}

function tasksOf(events: readonly TraceEvent[], overMs: number): PageTask[] {
  const marks = events.filter((e) => e.name === MARK);
  const since = Math.min(...marks.map((e) => e.ts));
  const threads = new Set(marks.map((e) => `${e.pid} ${e.tid}`));
  const own = events.filter((e) => threads.has(`${e.pid} ${e.tid}`));
  const tasks = own.filter((e) => e.name === 'RunTask' && e.ts > since && (e.dur ?? 0) > 1000 * overMs);
  const samples = samplesOf(events.filter((e) => e.name !== 'Profile' || threads.has(`${e.pid} ${e.tid}`)));
  return tasks.map((task) => ({
    clockMs: task.dur! / 1000,
    ownMs: (task.tdur ?? task.dur!) / 1000,
    stacks: samples.length === 0 ? '' : stacksOf(task, own, samples),
  }));
}

function stacksOf(task: TraceEvent, own: readonly TraceEvent[], samples: readonly Sample[]): string {
  const inside = (at: number) => at >= task.ts && at <= task.ts + task.dur!;
  const self = new Map<string, number>();
  const whole = new Map<string, number>();
  const add = (map: Map<string, number>, name: string, spent: number) =>
    map.set(name, (map.get(name) ?? 0) + spent);
  for (const { pid, at, spent, stack } of samples) {
    if (pid !== task.pid || !inside(at)) continue;
    add(self, stack[0]!, spent);
    for (const name of new Set(stack)) add(whole, name, spent);
  }
  // What the browser itself did: layout, painting, garbage.
  for (const e of own)
    if (e !== task && e.name !== 'RunTask' && inside(e.ts) && (e.dur ?? 0) > 3000)
      add(whole, `<${e.name}>`, e.dur!);
  const top = (map: Map<string, number>, n: number) =>
    [...map]
      .sort((a, b) => b[1] - a[1])
      .slice(0, n)
      .map(([name, spent]) => `${name} ${Math.round(spent / 1000)}`)
      .join(', ');
  return `in: ${top(self, 5)}; with what they call: ${top(whole, 14)}`;
}

interface Sample {
  readonly pid: number;
  readonly at: number;
  readonly spent: number;
  readonly stack: readonly string[];
}

/** Samples of the profiles that begin among the events, each with the names from the innermost function outward. */
function samplesOf(events: readonly TraceEvent[]): Sample[] {
  const out: Sample[] = [];
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
