import { type Signal, signal } from '@preact/signals';

/** The field that sets P0. */
export const P0_FIELD_ID = 'p0-field';

const PREFIX = 'conewright.section.';
const sections = new Map<string, Signal<boolean>>();

/** Whether a section of a panel stands open; remembered where the browser lets us. */
export function sectionOpen(id: string, atFirst: boolean): Signal<boolean> {
  const known = sections.get(id);
  if (known !== undefined) return known;
  const made = signal(recall(id) ?? atFirst);
  sections.set(id, made);
  return made;
}

export function setSectionOpen(id: string, open: boolean): void {
  sectionOpen(id, open).value = open;
  try {
    localStorage.setItem(PREFIX + id, open ? 'open' : 'closed');
  } catch {
    // Storage is switched off or full: the section opens all the same, and is forgotten with the window.
  }
}

/** Opens a section and takes the person there. */
export function revealSection(id: string): void {
  setSectionOpen(id, true);
  requestAnimationFrame(() => {
    const heading = document.getElementById(`section-${id}`);
    heading?.scrollIntoView({ block: 'start' });
    heading?.focus({ preventScroll: true });
  });
}

/** Opens a section and takes the person to a field in it. */
export function revealField(sectionId: string, fieldId: string): void {
  setSectionOpen(sectionId, true);
  requestAnimationFrame(() => {
    const field = document.getElementById(fieldId);
    field?.scrollIntoView({ block: 'center' });
    field?.focus({ preventScroll: true });
    if (field instanceof HTMLInputElement) field.select();
  });
}

function recall(id: string): boolean | null {
  try {
    const kept = localStorage.getItem(PREFIX + id);
    return kept === null ? null : kept === 'open';
  } catch {
    return null;
  }
}
