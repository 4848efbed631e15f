import { colourKey, colourOfKey } from '../../shared-core/study/colourBy.ts';
import { COLOUR_CHOICES, type ColourBy } from '../../shared-core/study/schema.ts';
import { useApp } from '../state/app.ts';
import { colourWords } from './colourWords.ts';

/** What galaxies are coloured by: the program's choices, and any column of the catalogue. */
export function ColourSelect(props: {
  readonly id?: string;
  readonly value: ColourBy | null;
  /** Where null is a choice of its own: its words. */
  readonly unsaid?: string;
  readonly onChoose: (by: ColourBy | null) => void;
}) {
  const { id, value, unsaid, onChoose } = props;
  const { engine } = useApp();
  const hasMagnitude = engine.selected.value?.magnitude != null;
  const columns = engine.loadedNow.value?.header ?? [];
  // A study may name a column that its catalogue has no more: it stays to be seen, and the engine says why it fails.
  const absent = value !== null && typeof value === 'object' && !columns.includes(value.column);
  const offered = absent ? [value.column, ...columns] : columns;
  return (
    <select
      {...(id === undefined ? {} : { id })}
      value={value === null ? '' : colourKey(value)}
      onChange={(e) => onChoose(e.currentTarget.value === '' ? null : colourOfKey(e.currentTarget.value))}
    >
      {unsaid === undefined ? null : <option value="">{unsaid}</option>}
      {COLOUR_CHOICES.map((choice) => (
        <option key={choice} value={choice} disabled={choice === 'magnitude' && !hasMagnitude}>
          {colourWords(choice)}
          {choice === 'magnitude' && !hasMagnitude ? ' (no such column chosen)' : ''}
        </option>
      ))}
      {offered.length === 0 ? null : (
        <optgroup label="Column of the catalogue">
          {offered.map((column) => (
            <option key={column} value={colourKey({ column })}>
              {column}
            </option>
          ))}
        </optgroup>
      )}
    </select>
  );
}
