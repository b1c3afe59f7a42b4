import { checkCommand } from './check.js';
import { runCommandLine } from './cli.js';
import { defaults } from './defaults.js';
import { solvers } from './solvers.js';

// A reader that has seen enough (`| head`) closes the pipe: no error, just nobody left to write for.
for (const stream of [process.stdout, process.stderr])
  stream.on('error', (error: NodeJS.ErrnoException) => {
    if (error.code !== 'EPIPE') throw error;
  });

process.exitCode = await runCommandLine(process.argv.slice(2), [checkCommand(solvers), defaults], {
  out: (text) => process.stdout.write(text),
  err: (text) => process.stderr.write(text),
  stdin: () => process.stdin,
  watched: process.stderr.isTTY,
  width: process.stdout.columns,
});
