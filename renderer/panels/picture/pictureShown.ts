import { signal } from '@preact/signals';

/** Whether the picture bench is open. */
export const pictureShown = signal(false);
