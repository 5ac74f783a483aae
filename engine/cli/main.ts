import { runCommand } from './commands.ts';

// The streams and the exit code are all this file knows of the process.
process.exitCode = runCommand(process.argv.slice(2), {
  out: (text) => process.stdout.write(text),
  err: (text) => process.stderr.write(text),
});

// A reader that has had enough (`… | head`) is no error.
process.stdout.on('error', (error: NodeJS.ErrnoException) => {
  if (error.code !== 'EPIPE') throw error;
});
