import Mocha from "mocha";
import { liveSuite } from "./live";
import { manifestSuite } from "./manifest";
import { planSuite } from "./plan";
import { questionSuite } from "./question";
import { saveSuite } from "./save";

/** The entry VS Code calls in its extension host. Ends with a plain line of counts, which the runner asks for. */
export function run(): Promise<void> {
  const mocha = new Mocha({ ui: "bdd", timeout: 40_000, reporter: "spec", color: false });
  mocha.suite.emit("pre-require", globalThis as unknown as Mocha.MochaGlobals, "", mocha);
  manifestSuite();
  questionSuite();
  planSuite();
  liveSuite();
  saveSuite();
  return new Promise((resolve, reject) => {
    const runner = mocha.run((failed) => {
      const passed = runner.stats?.passes ?? 0;
      console.log(`${passed} passed, ${failed} failed`);
      if (failed) reject(new Error(`${failed} failed`));
      else resolve();
    });
  });
}
