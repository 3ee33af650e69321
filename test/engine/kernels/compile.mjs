// Translates src/engine/kernels/kernels.wat to the bytes that the engine carries: node test/engine/kernels/compile.mjs rewrites kernels.wasm.ts.
import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import wabt from "wabt";

const folder = new URL("../../../src/engine/kernels/", import.meta.url);

/** The text of kernels.wasm.ts. */
export async function translate() {
  const source = readFileSync(new URL("kernels.wat", folder), "utf8");
  const module = (await wabt()).parseWat("kernels.wat", source, { simd: true });
  const bytes = Buffer.from(module.toBinary({}).buffer).toString("base64");
  return `/** kernels.wat, translated by test/engine/kernels/compile.mjs; in base64. */\nexport const KERNELS_WASM =\n  "${bytes}";\n`;
}

if (process.argv[1] === fileURLToPath(import.meta.url)) writeFileSync(new URL("kernels.wasm.ts", folder), await translate());
