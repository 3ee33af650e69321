import { Refusal } from "./cli/refusal";
import { run } from "./cli/run";

/** Exit code where the input cannot be used. */
const UNUSABLE = 2;

// a reader that has seen enough (head, less) closes the pipe: that is no failure
process.stdout.on("error", (error: NodeJS.ErrnoException) => {
  if (error.code !== "EPIPE") throw error;
  process.exit(0);
});

try {
  const { out, aside } = run(process.argv.slice(2));
  process.stderr.write(aside);
  process.stdout.write(out);
} catch (error) {
  if (!(error instanceof Refusal)) throw error;
  process.stderr.write(error.message + "\n");
  process.exitCode = UNUSABLE;
}
