/** Names of the messages between the page's preload script and the main process. */
export const CHANNELS = {
  call: 'conewright:call',
  dropped: 'conewright:dropped',
  event: 'conewright:event',
} as const;
