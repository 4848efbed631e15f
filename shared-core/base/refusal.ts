/**
 * An error meant for a person: one sentence that says what came, what was expected and what to do.
 * Hosts print `message` alone, never a stack trace.
 *
 * `kind` decides the exit code of the command line: 'use' (the command or form was filled in wrongly, exit 2)
 * or 'input' (a file or its contents cannot be used, exit 1).
 */
export class Refusal extends Error {
  override readonly name = 'Refusal';
  readonly kind: 'use' | 'input';

  constructor(message: string, kind: 'use' | 'input' = 'input') {
    super(message);
    this.kind = kind;
  }
}
