import { useState } from 'preact/hooks';
import { decimalsSentence } from '../../../shared-core/catalogue/reasons.ts';
import { useApp } from '../../state/app.ts';
import { countText } from '../../ui/numberText.ts';
import { setAsideLines } from './sourceFacts.ts';

/** What can be saved, by what its file is called after the study. */
type List = 'set aside' | 'repeated positions';

/** What became of the rows: read = kept + set aside, with the reasons, and the list of those set aside. */
export function RowsAccount() {
  const { engine, files, notices, studyState } = useApp();
  const [busy, setBusy] = useState<List | null>(null);
  // While another file is being read, the rows counted are still those of the file before.
  const read = engine.loadedNow.value;
  if (read === null) return null;
  const account = engine.selected.value?.account ?? read.account;
  const decimals = decimalsSentence(account);
  const download = async (list: List): Promise<void> => {
    setBusy(list);
    try {
      const blob = await (list === 'set aside' ? engine.client.setAsideList() : engine.client.repeatsList());
      await files.exportFile(`${studyState.study.value.name} ${list}.csv`, 'text/csv', pieces(blob));
    } catch (error) {
      notices.tell(error instanceof Error ? error.message : String(error));
    } finally {
      setBusy(null);
    }
  };
  const button = (list: List, label: string) => (
    <button type="button" class="link-button" disabled={busy !== null} onClick={() => void download(list)}>
      {busy === list ? 'Reading the file again…' : label}
    </button>
  );
  return (
    <div class="account">
      <dl>
        <div>
          <dt>rows read</dt>
          <dd>{countText(account.rowsRead)}</dd>
        </div>
        <div>
          <dt>kept</dt>
          <dd>{countText(account.kept)}</dd>
        </div>
        <div>
          <dt>set aside</dt>
          <dd>{countText(account.setAside)}</dd>
        </div>
        {setAsideLines(account).map(({ count, text }) => (
          <div key={text} class="account-reason">
            <dt>{text}</dt>
            <dd>{countText(count)}</dd>
          </div>
        ))}
      </dl>
      {decimals === null ? null : <p role="status">{decimals}</p>}
      {account.setAside === 0 ? null : button('set aside', 'Save the list of rows set aside…')}
      {account.repeatedPositions === 0 ? null : (
        <>
          <p class="quiet">
            {countText(account.repeatedPositions)} kept{' '}
            {account.repeatedPositions === 1 ? 'row repeats' : 'rows repeat'} an earlier position.
          </p>
          {button('repeated positions', 'Save the list of repeated positions…')}
        </>
      )}
    </div>
  );
}

/** The blob in pieces, so that a long list is never whole in memory twice. */
async function* pieces(blob: Blob): AsyncIterable<Uint8Array> {
  const step = 1 << 20;
  for (let from = 0; from < blob.size; from += step)
    yield new Uint8Array(await blob.slice(from, from + step).arrayBuffer());
}
