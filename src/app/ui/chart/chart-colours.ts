/** The theme's colours as a canvas needs them: resolved. */
export interface ChartColours {
  readonly ink: string;
  readonly secondInk: string;
  readonly rule: string;
  readonly sheet: string;
  readonly sunk: string;
  readonly edge: string;
  readonly leek: string;
  readonly leekTint: string;
  readonly lamp: string;
  readonly frost: string;
  readonly ember: string;
}

/** Reads the colours of the theme that the page shows now. */
export function readChartColours(page: HTMLElement): ChartColours {
  const style = getComputedStyle(page);
  const token = (name: string): string => style.getPropertyValue(name).trim();
  return {
    ink: token('--ink'),
    secondInk: token('--ink-2'),
    rule: token('--rule'),
    sheet: token('--sheet'),
    sunk: token('--sunk'),
    edge: token('--edge'),
    leek: token('--leek'),
    leekTint: token('--leek-tint'),
    lamp: token('--lamp'),
    frost: token('--frost'),
    ember: token('--ember'),
  };
}
