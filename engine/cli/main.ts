import { runCommand, type Streams } from './commands.ts';
import { sweepCommand } from './sweep-command.ts';

// The streams and the exit code are all this file knows of the process.
const streams: Streams = {
  out: (text) => process.stdout.write(text),
  err: (text) => process.stderr.write(text),
};
const [command, ...rest] = process.argv.slice(2);

// A reader that has had enough (`… | head`) is no error.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
});

process.exitCode = command === 'sweep' ? await sweepCommand(rest, streams) : runCommand(process.argv.slice(2), streams);
