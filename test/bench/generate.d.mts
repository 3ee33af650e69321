export function tableText(n: number, k: number, seed: number): Generator<string>;
export function tableFile(n: number, k: number): string;
