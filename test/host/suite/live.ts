import assert from "node:assert";
import { appendFileSync, mkdirSync, renameSync, rmSync, utimesSync } from "node:fs";
import { closeAll, heating, open, ready, record, scratch, stateOf, until, wait, write } from "./tools";

export function liveSuite(): void {
  describe("a panel follows its file", () => {
    let place: ReturnType<typeof scratch>;
    let file: string;
    beforeEach(async () => {
      place = scratch();
      file = place.path("flats.csv");
      write(file, heating(120, 300));
      await open(file);
      await until(file, ready(1));
    });
    afterEach(async () => {
      await closeAll();
      place.remove();
    });
    const summary = async () => (await stateOf(file))!.presentation!.summary;

    it("saved in place", async () => {
      const before = await summary();
      write(file, heating(120, 900));
      await until(file, ready(2));
      assert.notEqual(await summary(), before);
    });

    it("saved by rename", async () => {
      write(file + ".tmp", heating(130, 900));
      renameSync(file + ".tmp", file);
      await until(file, ready(2));
    });

    it("deleted and written again, without a word about a missing file", async () => {
      const seen = await record(file);
      rmSync(file);
      await wait(400);
      write(file, heating(130, 900));
      await until(file, ready(2));
      assert.deepEqual(
        seen().filter((kind) => kind === "missing" || kind === "unusable"),
        [],
      );
    });

    it("written slowly in pieces: one new reading, no error on the way", async () => {
      const seen = await record(file);
      const whole = heating(150, 900);
      const piece = Math.ceil(whole.length / 6);
      write(file, "");
      for (let at = 0; at < whole.length; at += piece) {
        await wait(250);
        appendFileSync(file, whole.slice(at, at + piece));
      }
      const state = await until(file, ({ status, reading }) => status.kind === "ready" && reading!.number > 1);
      assert.equal(state.reading?.number, 2);
      assert.match(state.presentation!.facts.join(), /150/);
      assert.deepEqual(
        seen().filter((kind) => kind === "missing" || kind === "unusable"),
        [],
      );
    });

    it("touched, or written again with the same bytes: the same reading", async () => {
      utimesSync(file, new Date(), new Date());
      await wait(1000);
      write(file, heating(120, 300));
      await wait(1500);
      const state = await until(file, ({ status }) => status.kind === "ready");
      assert.equal(state.reading?.number, 1);
    });

    it("gone for good, then back: missing, with the last result, then ready", async () => {
      rmSync(file);
      const gone = await until(file, ({ status }) => status.kind === "missing");
      assert.ok(gone.presentation);
      write(file, heating(130, 900));
      await until(file, ready(2));
    });

    it("its folder deleted and made again, which no watcher reports", async () => {
      const deep = place.path("out/clean.csv");
      mkdirSync(place.path("out"));
      write(deep, heating(120, 300));
      await open(deep);
      await until(deep, ready(1));
      rmSync(place.path("out"), { recursive: true });
      await wait(500);
      mkdirSync(place.path("out"));
      write(deep, heating(130, 900));
      await until(deep, ready(2));
    });

    it("unusable and standing still: the reason and the last result; then ready again", async () => {
      write(file, "flat_id\n");
      const broken = await until(file, ({ status }) => status.kind === "unusable");
      assert.ok(broken.presentation);
      write(file, heating(130, 900));
      await until(file, ready(2));
    });

    it("saved five times in a row: the newest wins", async () => {
      for (let i = 1; i <= 5; i++) {
        write(file, heating(120 + i, 900));
        await wait(90);
      }
      const state = await until(
        file,
        ({ status, presentation }) => status.kind === "ready" && presentation!.facts.join().includes("125"),
      );
      assert.match(state.presentation!.facts.join(), /125/);
    });
  });
}
