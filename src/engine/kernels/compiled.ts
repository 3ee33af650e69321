import type { Kernels } from "./types";
import { KERNELS_WASM } from "./kernels.wasm";

/** What kernels.wat exports; every offset and height counts doubles. */
interface Exports {
  readonly memory: WebAssembly.Memory;
  takeOut(to: number, from: number, x: number, share: number, height: number): void;
  addLeverage(to: number, from: number, x: number, inverse: number, height: number): void;
  times(to: number, x: number, factor: number, height: number): void;
  multiply(to: number, x: number, y: number, height: number): void;
  dot(x: number, y: number, height: number): number;
  run(at: number, end: number, height: number): void;
}

const PAGE_BYTES = 65536;
let compiled: WebAssembly.Module | null | undefined;

/** The loops as two-lane instructions (WebAssembly, written in kernels.wat): about three times as fast. Null where they cannot run. */
export function compiledKernels(): Kernels | null {
  if (compiled === undefined) compiled = compile();
  if (compiled === null) return null;
  const wasm = new WebAssembly.Instance(compiled).exports as unknown as Exports;
  let w = new Float64Array(wasm.memory.buffer);
  return {
    room: (doubles) => {
      const short = doubles * 8 - wasm.memory.buffer.byteLength;
      if (short > 0) wasm.memory.grow(Math.ceil(short / PAGE_BYTES));
      return (w = w.byteLength === wasm.memory.buffer.byteLength ? w : new Float64Array(wasm.memory.buffer));
    },
    takeOut: wasm.takeOut,
    times: wasm.times,
    multiply: wasm.multiply,
    dot: wasm.dot,
    addLeverage: wasm.addLeverage,
    run: wasm.run,
  };
}

function compile(): WebAssembly.Module | null {
  try {
    return new WebAssembly.Module(Uint8Array.from(atob(KERNELS_WASM), (letter) => letter.charCodeAt(0)));
  } catch {
    return null; // no WebAssembly, or no two-lane instructions
  }
}
