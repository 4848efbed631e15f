import { Dialog } from '../ui/Dialog.tsx';
import { KEY_HELP } from './keyTable.ts';

/** Which key, and which hand on the mouse, does what. */
export function KeysDialog({ onClose }: { readonly onClose: () => void }) {
  return (
    <Dialog title="Keys and mouse" kind="middle" onClose={onClose}>
      <div class="keys">
        {KEY_HELP.map(({ title, rows }) => (
          <section key={title} aria-label={title}>
            <h3>{title}</h3>
            <dl>
              {rows.map(({ keys, does }) => (
                <div key={does}>
                  <dt>
                    {keys.map((key) => (
                      <kbd key={key}>{key}</kbd>
                    ))}
                  </dt>
                  <dd>{does}</dd>
                </div>
              ))}
            </dl>
          </section>
        ))}
      </div>
    </Dialog>
  );
}
