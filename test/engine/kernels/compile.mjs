// Translates the .wat sources to the bytes that the program carries: node test/engine/kernels/compile.mjs rewrites every *.wasm.ts.
import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import wabt from "wabt";

const root = new URL("../../../", import.meta.url);

/** Each source with the file its bytes stand in, and that file's name for them. */
export const SOURCES = [
  { source: "src/engine/kernels/kernels.wat", target: "src/engine/kernels/kernels.wasm.ts", name: "KERNELS_WASM" },
  { source: "src/data/fast/plain.wat", target: "src/data/fast/plain.wasm.ts", name: "PLAIN_WASM" },
];

/** The text of a target. */
export async function translate({ source, name }) {
  const module = (await wabt()).parseWat(source, readFileSync(new URL(source, root), "utf8"), { simd: true });
  const bytes = Buffer.from(module.toBinary({}).buffer).toString("base64");
  const file = source.split("/").at(-1);
  return `/** ${file}, translated by test/engine/kernels/compile.mjs; in base64. */\nexport const ${name} =\n  "${bytes}";\n`;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  for (const each of SOURCES) writeFileSync(new URL(each.target, root), await translate(each));
}
