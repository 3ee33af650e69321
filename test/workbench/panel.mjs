// Reads the figures of the panel's page and of the command line, and compares the two.
import assert from "node:assert";

/** The Shifts table: one entry a row, its cells as text. */
export async function readPanel(page) {
  return page.locator('[data-section="shifts"] [data-set]').evaluateAll((rows) =>
    rows
      .filter((row) => row.querySelector('[data-cell="held"]'))
      .map((row) => {
        const text = (name) => (row.querySelector(`[data-cell="${name}"]`)?.textContent ?? "").replace(/\s+/g, " ").trim();
        return {
          held: text("held"),
          rows: text("rows"),
          difference: text("difference"),
          shift: text("shift"),
          word: text("word"),
        };
      }),
  );
}

export async function cellsOf(page) {
  return (await readPanel(page)).flatMap((row) => Object.values(row));
}

/** The first table of a Markdown text: the cells of each row behind its head, unescaped. */
export function rowsOfMarkdown(text) {
  const lines = text.split("\n");
  const rule = lines.findIndex((line) => /^\|[\s:|-]+\|$/.test(line));
  assert.ok(rule > 0, "the Markdown holds a table");
  const rows = [];
  for (let i = rule + 1; i < lines.length && lines[i].startsWith("|"); i++) {
    rows.push(
      lines[i]
        .split(/(?<!\\)\|/)
        .slice(1, -1)
        .map((cell) => plain(cell)),
    );
  }
  return rows;
}

/** The estimates of the first contrast, one a set. */
export function rowsOfJson(comparison) {
  return comparison.sets.map((set) => {
    const { readout } = set.contrasts[0];
    return "estimate" in readout ? readout.estimate : null;
  });
}

/** Asks the page until it agrees with both; on the last try says where it does not. */
export async function agree(read, markdown, estimates) {
  const end = Date.now() + 20_000;
  for (;;) {
    const rows = await read();
    try {
      assert.equal(rows.length, markdown.length, "as many rows as the command line's table");
      rows.forEach((row, i) => {
        for (const cell of [row.rows, row.difference, row.shift, row.word]) {
          assert.ok(
            markdown[i].some((text) => plain(text).includes(plain(cell))),
            `«${cell}» in ${JSON.stringify(markdown[i])}`,
          );
        }
        if (estimates[i] !== null) assertRounded(row.difference, estimates[i]);
      });
      return;
    } catch (error) {
      if (Date.now() > end) throw error;
      await new Promise((done) => setTimeout(done, 100));
    }
  }
}

/** The number that opens a cell is the estimate rounded to the places shown. */
function assertRounded(cell, estimate) {
  const shown = /[+−-]?[\d,]+(\.\d+)?/.exec(cell);
  assert.ok(shown, `a number in «${cell}»`);
  const value = Number(shown[0].replace("−", "-").replaceAll(",", ""));
  const places = shown[1] ? shown[1].length - 1 : -trailingZeros(shown[0]);
  const half = 0.5 * 10 ** -places;
  assert.ok(Math.abs(value - estimate) <= half * (1 + 1e-9), `${shown[0]} is ${estimate} rounded`);
}

/** An estimate with a large error is shown to tens or hundreds. */
function trailingZeros(number) {
  return /(0*)$/.exec(number.replaceAll(",", ""))[1].length;
}

function plain(text) {
  return text
    .replace(/<br\s*\/?>/g, " ")
    .replace(/\*\*|\\/g, "")
    .replace(/&lt;/g, "<")
    .replace(/&gt;/g, ">")
    .replace(/&amp;/g, "&")
    .replace(/\s+/g, " ")
    .trim();
}
