// Reads an address as an engine does: in a worker, whole or in a range.
export interface ReadRequest {
  url: string;
  range: string | null;
}

export interface ReadAnswer {
  status: number;
  text: string;
  isolated: boolean;
}

addEventListener('message', async ({ data: { url, range } }: MessageEvent<ReadRequest>) => {
  const response = await fetch(url, { headers: range === null ? {} : { range } });
  const answer: ReadAnswer = {
    status: response.status,
    text: await response.text(),
    isolated: globalThis.crossOriginIsolated,
  };
  postMessage(answer);
});
