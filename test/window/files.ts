import { fileURLToPath } from 'node:url';
import type { Page } from '@playwright/test';

const data = (name: string) => fileURLToPath(new URL(`../data/${name}`, import.meta.url));
/** A published catalogue, and the window that it was observed in; test/data says whose. */
export const SHAPLEY = data('shapley.csv');
export const SHAPLEY_WINDOW = data('shapley-window.txt');

export const csv = (name: string, text: string) => ({
  name,
  mimeType: 'text/csv',
  buffer: Buffer.from(text),
});

/** Rows of ra, dec, z in a field of ten degrees. */
export const table = (rows: number) =>
  `ra,dec,z\n${Array.from({ length: rows }, (_, i) => `${150 + (i % 977) / 100},${(i % 991) / 100},${(0.1 + (i % 1000) / 1000).toFixed(4)}`).join('\n')}\n`;

/** Opens a file that is picked, as a browser gives it: by name and contents, without a path. */
export async function pick(page: Page, file: ReturnType<typeof csv>): Promise<void> {
  const [chooser] = await Promise.all([
    page.waitForEvent('filechooser'),
    page.getByRole('button', { name: /^Open (your catalogue|another)/ }).click(),
  ]);
  await chooser.setFiles(file);
}

/** Drops a file on the window. */
export async function drop(page: Page, name: string, content: string): Promise<void> {
  const data = await page.evaluateHandle(
    ([name, content]) => {
      const transfer = new DataTransfer();
      transfer.items.add(new File([content!], name!));
      return transfer;
    },
    [name, content],
  );
  for (const kind of ['dragenter', 'dragover', 'drop'])
    await page.dispatchEvent('.frame', kind, { dataTransfer: data });
}
