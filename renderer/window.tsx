import './theme.css';
import './frame.css';
import { render } from 'preact';
import { nextTask } from './cone/points/slices.ts';
import { createQuestions } from './state/questions.ts';

/** Each part is loaded, and then does its work, in a task of its own: all at once would block the page. */
async function start(): Promise<void> {
  const place = document.getElementById('window')!;
  const questions = createQuestions();
  const { connectHost } = await import('./host/connect.ts');
  const bridge = await connectHost(questions);
  const { AppContext, createApp } = await import('./state/app.ts');
  await nextTask();
  const theme = matchMedia('(prefers-color-scheme: light)').matches ? 'light' : 'dark';
  const app = createApp(bridge, { theme, questions });
  // What every panel will ask for, worked out before them.
  const { cosmology, axis, deepestRedshift } = app.derived;
  await nextTask();
  cosmology.value.table();
  await nextTask();
  axis.value.redshiftAt(axis.value.at(deepestRedshift.value));
  const { Frame } = await import('./frame.tsx');
  await nextTask();
  render(
    <AppContext.Provider value={app}>
      <Frame />
    </AppContext.Provider>,
    place,
  );
  for (const trouble of bridge.launch.troubles) app.notices.tell(trouble);
  if (bridge.launch.files.length > 0) await app.files.openFiles(bridge.launch.files);
}

void start().catch((error: unknown) => {
  const place = document.getElementById('window')!;
  place.textContent = `Conewright could not start: ${error instanceof Error ? error.message : String(error)}`;
});
