import './theme.css';
import './frame.css';
import { render } from 'preact';
import { nextTask } from './cone/points/slices.ts';
import { Frame } from './frame.tsx';
import { connectHost } from './host/connect.ts';
import { AppContext, createApp } from './state/app.ts';
import { createQuestions } from './state/questions.ts';

async function start(): Promise<void> {
  const place = document.getElementById('window')!;
  const questions = createQuestions();
  const bridge = await connectHost(questions);
  // What follows is a task of its own, and the frame another.
  await nextTask();
  const theme = matchMedia('(prefers-color-scheme: light)').matches ? 'light' : 'dark';
  const app = createApp(bridge, { theme, questions });
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
