import { Command, CommanderError } from 'commander';
import { Refusal } from '../../shared-core/base/refusal.ts';
import { addCoordinates } from './verbs/coordinates.ts';
import { addDemo } from './verbs/demo.ts';
import { addDistances } from './verbs/distances.ts';
import { addPicture } from './verbs/picture.ts';
import { addShells } from './verbs/shells.ts';

export interface Streams {
  /** Results. */
  readonly print: (text: string) => void;
  /** Messages, a line each. */
  readonly say: (text: string) => void;
}

const HOST_STREAMS: Streams = {
  print: (text) => void process.stdout.write(text),
  say: (text) => void process.stderr.write(`${text}\n`),
};

/**
 * Runs one command line.
 * @param windowFolder the built window, which draws pictures; null where it is not built
 * @returns the exit code: 0; 2 for wrong use; 1 for input that cannot be used
 */
export async function run(
  argv: readonly string[],
  { print, say }: Streams = HOST_STREAMS,
  windowFolder: string | null = null,
): Promise<number> {
  const program = new Command('conewright')
    .description('Redshift shells of a galaxy survey, and what each is worth.')
    .usage('VERB [options]    (npm run -s conewright -- VERB [options])')
    .helpCommand(false)
    .exitOverride()
    .configureOutput({ writeOut: print, writeErr: (text) => say(`${oneLine(text)}; ask with --help.`) });
  addDistances(program, print);
  addShells(program, print);
  addCoordinates(program, say);
  addDemo(program, print, say);
  addPicture(program, say, windowFolder);
  for (const command of program.commands) command.copyInheritedSettings(program);
  if (argv.length === 0) {
    say('No verb came: use distances, shells, coordinates, demo or picture, each with --help.');
    return 2;
  }
  try {
    await program.parseAsync(argv as string[], { from: 'user' });
    return 0;
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? 0 : 2;
    if (error instanceof Refusal) {
      say(`conewright: ${oneLine(error.message)}`);
      return error.kind === 'use' ? 2 : 1;
    }
    const reason = error instanceof Error ? error.message : String(error);
    say(
      `conewright: something in the program failed (${oneLine(reason)}); please report it with the command you gave.`,
    );
    return 1;
  }
}

function oneLine(text: string): string {
  return text
    .trim()
    .replace(/^error: /, 'conewright: ')
    .replace(/\s*\n\s*/g, ' ');
}
