export interface WatSource {
  readonly source: string;
  readonly target: string;
  readonly name: string;
}
export const SOURCES: readonly WatSource[];
export function translate(source: WatSource): Promise<string>;
