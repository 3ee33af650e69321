export function translate(): Promise<string>;
