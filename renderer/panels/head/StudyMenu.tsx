import { useApp } from '../../state/app.ts';
import { Menu, type MenuEntry } from '../../ui/Menu.tsx';
import { shortcut } from '../keyTable.ts';

const MOST_RECENT = 8;

/** New, open, recent, save. */
export function StudyMenu() {
  const { files } = useApp();
  const recent = files.recent.value.slice(0, MOST_RECENT);
  const item = (label: string, hint: string, run: () => unknown): Extract<MenuEntry, { kind: 'item' }> => ({
    kind: 'item',
    label,
    ...(hint === '' ? {} : { hint }),
    run: () => void run(),
  });
  return (
    <Menu
      label="Study"
      entries={[
        item('New study', shortcut('N'), () => files.newStudy()),
        item('Open a study…', shortcut('O'), () => files.open('study')),
        item('Open a catalogue…', '', () => files.open('catalogue')),
        item('The invented demo survey', '', () => files.openDemo()),
        ...(recent.length === 0
          ? []
          : [
              {
                kind: 'group' as const,
                label: 'Recent',
                entries: recent.map(({ id, name, folder, found }) => ({
                  ...item(name, found ? folder : `not found in ${folder}`, () => files.openRecent(id)),
                  disabled: !found,
                })),
              },
            ]),
        {
          kind: 'group',
          label: 'This study',
          entries: [
            item('Save', shortcut('S'), () => files.save()),
            item('Save as…', shortcut('S', true), () => files.saveAs()),
          ],
        },
      ]}
    />
  );
}
