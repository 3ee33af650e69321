import { createHash } from "node:crypto";
import { ReaderMemory } from "../../data/fast/memory";
import { readTable } from "../../data/read";
import type { Problem } from "../../engine/findings";
import type { Plan } from "../../engine/plan";
import type { Table } from "../../engine/table";
import { KeptFile } from "./file";
import type { Stamp } from "./messages";
import { sameStamp } from "./stamp";

/** A file just written may be written again within the clock's tick; only an older one is known by its stamp. */
const CLOCK_TICK_MS = 100;

export type TableRead =
  | { readonly kind: "table"; readonly table: Table; readonly stamp: Stamp; readonly ended: boolean }
  | { readonly kind: "same"; readonly stamp: Stamp }
  | { readonly kind: "gone" }
  | { readonly kind: "torn" }
  | { readonly kind: "problem"; readonly problem: Problem; readonly stamp: Stamp | null };

interface Kept {
  readonly file: KeptFile;
  stamp: Stamp | null;
  /** When the stamp was taken, ms since 1970. */
  at: number;
  sha256: string | null;
  ended: boolean;
  /** By the missing marks they were read with: plans on the same CSV share a reading. */
  tables: Map<string, Table>;
  /** The arrays each of these tables stands in, for the next reading. */
  readonly memories: Map<string, ReaderMemory>;
}

/** The files in use with their columns, kept between saves. */
export class Readings {
  private readonly kept = new Map<string, Kept>();

  /**
   * The table of a file under a plan's missing marks.
   * @param known fingerprint whose bytes need no answer: equal bytes give "same"
   * @param reread false takes the columns of the last read where there are any
   */
  table(path: string, file: string, missing: Plan["missing"], known: string | null, reread: boolean): TableRead {
    const kept = this.entry(path);
    const marks = marksOf(missing);
    const held = kept.tables.get(marks);
    if (!reread && held && kept.stamp) return { kind: "table", table: held, stamp: kept.stamp, ended: kept.ended };

    const read = kept.file.read(path, file);
    if (read.kind === "problem") return { ...read, stamp: null };
    if (read.kind !== "bytes") return read;
    const { bytes, stamp } = read;
    const sure = sameStamp(stamp, kept.stamp) && kept.at - stamp.mtimeMs > CLOCK_TICK_MS;
    const alike = sure || (kept.sha256 !== null && kept.stamp?.size === stamp.size && kept.sha256 === sha256(bytes));
    kept.stamp = stamp;
    kept.at = Date.now();
    if (alike && known !== null && known === kept.sha256) return { kind: "same", stamp };
    if (alike && held) return { kind: "table", table: held, stamp, ended: kept.ended };
    if (!alike) {
      kept.tables = new Map();
      kept.sha256 = null;
    }
    kept.ended = endsWithBreak(bytes);
    const parsed = readTable(bytes, { file, missing }, this.memoryOf(kept, marks));
    if (!parsed.ok) return { kind: "problem", problem: parsed.problem, stamp };
    kept.tables.set(marks, parsed.table);
    kept.sha256 = parsed.table.source.sha256;
    if (known !== null && known === kept.sha256) return { kind: "same", stamp };
    return { kind: "table", table: parsed.table, stamp, ended: kept.ended };
  }

  private memoryOf({ memories }: Kept, marks: string): ReaderMemory {
    let memory = memories.get(marks);
    if (!memory) memories.set(marks, (memory = new ReaderMemory()));
    return memory;
  }

  /** Columns of the last read, if they are those of these bytes under these marks. */
  held(path: string, missing: Plan["missing"], sha256: string): Table | null {
    const table = this.kept.get(path)?.tables.get(marksOf(missing));
    return table?.source.sha256 === sha256 ? table : null;
  }

  forget(path: string): void {
    this.kept.delete(path);
  }

  private entry(path: string): Kept {
    let kept = this.kept.get(path);
    if (!kept) {
      kept = { file: new KeptFile(), stamp: null, at: 0, sha256: null, ended: true, tables: new Map(), memories: new Map() };
      this.kept.set(path, kept);
    }
    return kept;
  }
}

function marksOf(missing: Plan["missing"]): string {
  return JSON.stringify(missing ?? null);
}

function sha256(bytes: Uint8Array): string {
  return createHash("sha256").update(bytes).digest("hex");
}

/** A line feed or carriage return at the end, in UTF-8 or either UTF-16. */
function endsWithBreak(bytes: Uint8Array): boolean {
  const end = bytes.length;
  const last = bytes[end - 1];
  return last === 10 || last === 13 || (last === 0 && (bytes[end - 2] === 10 || bytes[end - 2] === 13));
}
