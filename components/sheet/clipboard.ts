import { copyParts, pasteClip, readClip, type Clip } from '@/diagram/commands/copy';
import { pieceSvg } from '@/diagram/paper/piece-svg';
import type { Hands } from './hands';

const SVG = 'image/svg+xml';

/** What the system clipboard takes: the piece as JSON for the sheet, and as a picture for other programs. */
function clipboardItem(clip: Clip, svg: string | null): ClipboardItem {
  const json = new Blob([JSON.stringify(clip)], { type: 'text/plain' });
  const takesSvg = svg !== null && typeof ClipboardItem.supports === 'function' && ClipboardItem.supports(SVG);
  return new ClipboardItem({ 'text/plain': json, ...(takesSvg && { [SVG]: new Blob([svg], { type: SVG }) }) });
}

/** Copying and pasting pieces of a drawing, through the system's clipboard where the browser shares it. */
export class Clipboard {
  private clip: Clip | null = null;

  constructor(private readonly hands: Hands) {}

  async copy(cut = false): Promise<void> {
    const { hands } = this;
    const { selection, say } = hands.store.getState();
    const clip = copyParts(hands.doc, selection.parts);
    if (!clip) return say('Take parts in hand to copy them.');
    this.clip = clip;
    say(`Copied ${clip.parts.length} ${clip.parts.length === 1 ? 'part' : 'parts'}.`);
    const svg = pieceSvg(hands.scene(), selection.parts, hands.doc.title);
    if (cut) hands.remove();
    try {
      await navigator.clipboard.write([clipboardItem(clip, svg)]);
    } catch {
      // The browser keeps its clipboard to itself: the copy can still be pasted in this window.
      say(`Copied ${clip.parts.length} for this window only: the browser does not share its clipboard.`);
    }
  }

  /** @param text what the browser says lies on the clipboard; asked for where it is not given */
  async paste(text?: string): Promise<void> {
    const { hands } = this;
    const given = text ?? (await navigator.clipboard.readText().catch(() => ''));
    const clip = readClip(given) ?? this.clip;
    if (clip) hands.do(pasteClip(hands.doc, clip, hands.newId));
    else hands.store.getState().say('The clipboard holds no piece of a drawing.');
  }

  duplicate(): void {
    const { hands } = this;
    const { selection, say } = hands.store.getState();
    const clip = copyParts(hands.doc, selection.parts);
    if (clip) hands.do(pasteClip(hands.doc, clip, hands.newId, 'Duplicate'));
    else say('Take parts in hand to duplicate them.');
  }
}
