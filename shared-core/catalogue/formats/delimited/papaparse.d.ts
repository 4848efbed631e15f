// The published types of papaparse pull in Node's, which the core is checked without. This is the part in use:
// its low-level parser, which is synchronous, takes text in pieces and runs in any host.
declare module 'papaparse/papaparse.js' {
  interface ParseFault {
    readonly type: string;
    readonly code: string;
    /** Which of `data` it belongs to; data.length when that row is not complete. */
    readonly row: number;
    /** Of a fault of quotes: where the text of the quoted cell begins. */
    readonly index: number;
  }
  interface ParseOutcome {
    readonly data: string[][];
    readonly errors: readonly ParseFault[];
    /** cursor: where the last complete row ended. */
    readonly meta: { readonly cursor: number };
  }
  class Parser {
    constructor(config: { readonly delimiter: string; readonly newline: '\n' | '\r' });
    parse(text: string, baseIndex: number, ignoreLastRow: boolean): ParseOutcome;
  }
  const Papa: { readonly Parser: typeof Parser };
  export default Papa;
}
