import { failure } from "./cli/failure";
import { run } from "./cli/run";

// a reader that has seen enough (head, less) closes the pipe: that is no failure
process.stdout.on("error", (error: NodeJS.ErrnoException) => {
  if (error.code !== "EPIPE") throw error;
  process.exit(0);
});

try {
  const { out, aside, exitCode = 0 } = run(process.argv.slice(2));
  process.stderr.write(aside);
  process.stdout.write(out);
  process.exitCode = exitCode;
} catch (error) {
  const { text, exitCode } = failure(error);
  process.stderr.write(text + "\n");
  process.exitCode = exitCode;
}
