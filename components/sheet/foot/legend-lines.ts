import type { Scene } from '@/diagram/layout/scene';
import { legend, symbolById } from '@/diagram/symbols';
import type { SymbolData } from '@/diagram/symbols/types';

/** 1/100 mm: how long a bar is shown in the legend, whatever its length on the sheet */
const BAR = 1500;

/** Every symbol that stands on a face, once each, as that face draws it, in the order of current. */
export function symbolsOn(scene: Pick<Scene, 'parts'>): SymbolData[] {
  const order = new Map(legend().flatMap((symbol, i) => symbol.kinds.map((kind) => [kind as string, i] as const)));
  const drawn = new Map<string, { symbol: SymbolData; at: number }>();
  for (const part of scene.parts) {
    const symbol = symbolById(part.symbol, part.kind.endsWith('-bar') ? BAR : part.width);
    // A fuse of one pole and one of two are one symbol to whoever reads the sheet.
    if (!drawn.has(symbol.name)) drawn.set(symbol.name, { symbol, at: order.get(part.kind) ?? order.size });
  }
  return [...drawn.values()].sort((a, b) => a.at - b.at).map(({ symbol }) => symbol);
}
