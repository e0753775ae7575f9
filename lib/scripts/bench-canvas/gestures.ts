import type { Page } from 'playwright';

export interface Gesture {
  /** what the pointer takes hold of */
  selector: string;
  /** of the mouse: 0 left, 1 middle */
  button: 0 | 1;
  frames: number;
  /** px a frame */
  step: { x: number; y: number };
}

const WARM_UP = 5;

/**
 * One gesture with exactly one move of the pointer a frame, out and back.
 * @returns ms from frame to frame
 */
export const gesture = (page: Page, wanted: Gesture): Promise<number[]> =>
  page.evaluate(
    async ({ selector, button, frames, step, warmUp }) => {
      const element = document.querySelector(selector);
      if (!element) throw new Error(`nothing on the page is ${selector}`);
      const box = element.getBoundingClientRect();
      const x = box.left + box.width / 2;
      const y = box.top + box.height / 2;
      const send = (type: 'down' | 'move' | 'up', dx: number, dy: number) => {
        const init = {
          ...{ bubbles: true, cancelable: true, view: window, clientX: x + dx, clientY: y + dy, button },
          ...{ buttons: type === 'up' ? 0 : button === 1 ? 4 : 1, pointerId: 1, isPrimary: true, pointerType: 'mouse' },
        };
        element.dispatchEvent(new PointerEvent(`pointer${type}`, init));
        element.dispatchEvent(new MouseEvent(`mouse${type}`, init));
      };
      const times: number[] = [];
      send('down', 0, 0);
      await new Promise<void>((done) => {
        let frame = 0;
        let before = 0;
        const next = (now: number) => {
          if (before > 0) times.push(now - before);
          before = now;
          if (frame++ >= frames) {
            send('up', 0, 0);
            done();
            return;
          }
          const far = frame < frames / 2 ? frame : frames - frame;
          send('move', step.x * far, step.y * far);
          requestAnimationFrame(next);
        };
        requestAnimationFrame(next);
      });
      return times.slice(warmUp);
    },
    { ...wanted, warmUp: WARM_UP },
  );

/** Id of a part or node that stands well inside the canvas. */
export const nodeInSight = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const canvas = document.querySelector('.react-flow')!.getBoundingClientRect();
    for (const node of document.querySelectorAll<HTMLElement>('.react-flow__node')) {
      const box = node.getBoundingClientRect();
      const inside =
        box.left > canvas.left + 150 &&
        box.right < canvas.right - 250 &&
        box.top > canvas.top + 150 &&
        box.bottom < canvas.bottom - 150;
      if (inside) return node.dataset.id!;
    }
    throw new Error('no node stands in the middle of the canvas');
  });

/** Steps back until the whole drawing is in sight: the sheet by its key, the bare page by the wheel. */
export async function zoomOut(page: Page, by: 'key' | 'wheel'): Promise<void> {
  if (by === 'key') await page.getByRole('application').focus();
  for (let i = 0; i < 9; i++) {
    if (by === 'key') await page.keyboard.press('-');
    else {
      await page.mouse.move(500, 400);
      await page.mouse.wheel(0, 160);
    }
    await page.waitForTimeout(60);
  }
  await page.waitForTimeout(600);
}

/** The value below which so large a share of the values lies. */
export function quantile(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  const value = sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
  if (value === undefined) throw new Error('nothing was measured');
  return value;
}
