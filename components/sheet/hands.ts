import { allowedFrom, joinTerminals } from '@/diagram/commands/join-terminals';
import { deleteSelection } from '@/diagram/commands/delete-selection';
import { marksOf, sameEnd, wiresAt } from '@/diagram/commands/ends';
import { moveLoad } from '@/diagram/commands/move-load';
import { placeSupply, placeSupplyAlone } from '@/diagram/commands/place-supply';
import { renumber } from '@/diagram/commands/renumber';
import { isRefusal, type Command, type NewId, type Refusal } from '@/diagram/commands/types';
import { walkFromSources, type Walk } from '@/diagram/commands/walk';
import type { End, Installation } from '@/diagram/document/schema';
import { buildScene } from '@/diagram/layout/build-scene';
import type { Scene, SceneRun } from '@/diagram/layout/scene';
import { isPoint } from '@/diagram/terminals/roles-of-parts';
import { Clipboard } from './clipboard';
import { guided } from './guiding';
import { runInHand } from './leading';
import { leaveWalk } from './margin/showing';
import { shiftParts } from './moving';
import { firstPart, handEnd, nextPart, type Direction } from './navigate';
import type { DrawingStore } from './store';
import { lockHolds } from './placing';
import { NOTHING } from './store';
import { REST, type View } from './view';

interface HandsTools {
  store: DrawingStore;
  view: View;
  newId: NewId;
}

/**
 * All that hands do on the sheet, by key, mouse or finger: the same few functions, each of which ends in one named command
 * or in a change of what is in hand.
 */
export class Hands {
  readonly store: DrawingStore;
  readonly view: View;
  readonly newId: NewId;
  private shown: { scene: Scene; of: Installation } | null = null;
  private walked: { doc: Installation; walk: Walk } | null = null;
  readonly clipboard = new Clipboard(this);

  constructor(tools: HandsTools) {
    this.store = tools.store;
    this.view = tools.view;
    this.newId = tools.newId;
  }

  /** The canvas shows another scene: the hands act on that one from now on. @param of the document that it shows */
  show(scene: Scene, of: Installation = this.doc): void {
    this.shown = { scene, of };
  }

  /** The page on the canvas, of the document as it stands: worked out here where hands are faster than the canvas. */
  scene(): Scene {
    if (!this.shown) throw new Error('no scene is on the canvas yet');
    if (this.shown.of !== this.doc) {
      const { scene } = this.shown;
      const { face, place } = scene;
      this.show(buildScene(this.doc, face, { before: scene, ...(place !== undefined && { place }) }));
    }
    return this.shown.scene;
  }

  private get state() {
    return this.store.getState();
  }

  get doc(): Installation {
    return this.state.document;
  }

  get walk(): Walk {
    if (this.walked?.doc !== this.doc) this.walked = { doc: this.doc, walk: walkFromSources(this.doc) };
    return this.walked.walk;
  }

  get mayEdit(): boolean {
    return this.state.rights.edit && this.view.getState().editing;
  }

  /** Does a command, or says why not. */
  do(outcome: Command | Refusal): boolean {
    if (!this.mayEdit) {
      this.state.say('You may read this drawing.');
      return false;
    }
    if (isRefusal(outcome)) {
      this.state.say(outcome.refused);
      return false;
    }
    if (!this.state.run(outcome.label, outcome.patch)) {
      this.state.say('That would change nothing.');
      return false;
    }
    if (outcome.next) this.state.select({ parts: [outcome.next[0]], wires: [], terminal: outcome.next });
    else if (outcome.parts) this.state.select({ parts: outcome.parts, wires: [], terminal: null });
    return true;
  }

  /** Takes a part in hand, at a terminal of it. */
  take(id: string, end: End | null = handEnd(this.doc, this.walk, id)): void {
    this.state.select({ parts: [id], wires: [], terminal: end });
  }

  /** Takes a part in hand and brings it into sight, on the page where it is drawn. */
  goTo(id: string): void {
    const { face, set } = this.view.getState();
    const place = this.doc.parts.find((part) => part.id === id)?.place;
    if (face === 'connections' && place !== undefined) set({ place });
    this.take(id);
  }

  letGo(): void {
    const { mode, setMode } = this.view.getState();
    if (mode.kind !== 'rest') setMode(REST);
    else if (!leaveWalk(this.view)) this.state.select(NOTHING);
  }

  /** Of terminals that are drawn at one point, the one that is meant: where the wire in hand may go, else where drawing goes on. */
  oneOf(ends: readonly End[]): End | null {
    const { mode } = this.view.getState();
    const from = mode.kind === 'wire' ? mode.from : mode.kind === 'extend' ? mode.end : null;
    const allowed = from ? allowedFrom(this.doc, from, [...ends])[0] : undefined;
    const own = ends[0] && handEnd(this.doc, this.walk, ends[0][0]);
    return allowed ?? ends.find((end) => own && sameEnd(end, own)) ?? ends[0] ?? null;
  }

  /** A pointer on a part: takes it in hand, or ends the wire that hangs there. */
  tap(end: End | null, id: string, finger: boolean): void {
    const { mode, setMode } = this.view.getState();
    if (mode.kind === 'wire' && end) {
      this.endWire(end);
      return;
    }
    if (finger && mode.kind === 'extend' && end && !sameEnd(end, mode.end)) {
      setMode(REST);
      this.do(joinTerminals(this.doc, mode.end, end, this.newId));
      return;
    }
    if (mode.kind !== 'rest') setMode(REST);
    this.state.select({ parts: [id], wires: [], terminal: end ?? handEnd(this.doc, this.walk, id) });
    if (finger && this.mayEdit && end) this.extend();
  }

  arrow(direction: Direction): void {
    const scene = this.scene();
    const [id] = this.state.selection.parts;
    const next = id ? nextPart(this.doc, this.walk, scene, id, direction) : firstPart(scene);
    if (next) this.take(next);
    else this.state.say('Nothing lies that way.');
  }

  /** The next terminal of the part in hand. @returns false past the last one: the focus may leave the sheet */
  terminal(step: 1 | -1): boolean {
    const { parts, terminal } = this.state.selection;
    const part = this.doc.parts.find((candidate) => candidate.id === parts[0]);
    if (!part) return false;
    const marks = marksOf(this.doc, part);
    const index = terminal ? marks.indexOf(terminal[1]) : -1;
    const next = marks[index + step];
    if (!next) return false;
    this.state.select({ terminal: [part.id, next] });
    return true;
  }

  extend(): void {
    const { terminal } = this.state.selection;
    if (!this.mayEdit) this.state.say('You may read this drawing.');
    else if (!terminal) this.state.say('Take a terminal in hand first: arrows, or a click on a part.');
    else this.view.getState().setMode({ kind: 'extend', end: terminal, typed: '', index: 0, open: false, choice: {} });
  }

  /** Terminals a wire from the one in hand may go to, in reading order. */
  candidates(from: End): End[] {
    const ends = this.scene().parts.flatMap((part) => part.terminals.map(({ mark }): End => [part.id, mark]));
    return allowedFrom(this.doc, from, ends);
  }

  wire(): void {
    const { terminal } = this.state.selection;
    if (!this.mayEdit) this.state.say('You may read this drawing.');
    else if (!terminal) this.state.say('Take a terminal in hand first: arrows, or a click on a part.');
    else if (this.candidates(terminal).length === 0) this.state.say('No other terminal carries the same conductor.');
    else this.view.getState().setMode({ kind: 'wire', from: terminal, index: 0 });
  }

  endWire(to?: End): void {
    const { mode, setMode } = this.view.getState();
    if (mode.kind !== 'wire') return;
    const target = to ?? this.candidates(mode.from)[mode.index];
    setMode(REST);
    if (target) this.do(joinTerminals(this.doc, mode.from, target, this.newId));
  }

  /** Begins to move what is in hand, in modules. */
  startMove(): void {
    if (!this.mayEdit) this.state.say('You may read this drawing.');
    else if (this.state.selection.parts.length === 0 && !runInHand(this.scene(), this.state.selection))
      this.state.say('Take a part or a run in hand first.');
    else if (!lockHolds(this, this.state.selection.parts)) this.view.getState().setMode({ kind: 'move', dx: 0, dy: 0 });
  }

  /**
   * A pointer lets go of parts that it has dragged so far, in 1/100 mm: they go where the guides show.
   * @returns whether they stand elsewhere now
   */
  moveBy(ids: readonly string[], dx: number, dy: number): boolean {
    const { dx: x, dy: y } = guided(this.scene(), ids, dx, dy) ?? { dx, dy };
    return shiftParts(this, ids, x, y);
  }

  remove(): void {
    const { parts, wires } = this.state.selection;
    if (parts.length === 0 && wires.length === 0) this.state.say('Nothing is in hand.');
    else this.do(deleteSelection(this.doc, parts, wires));
  }

  renumber(): void {
    this.do(renumber(this.doc));
  }

  placeSupply(alone = false): void {
    if (this.do(alone ? placeSupplyAlone(this.doc) : placeSupply(this.doc))) this.view.getState().camera?.all();
  }

  /** Opens the list of ways for the loads in hand. */
  chooseWay(): void {
    const loads = this.state.selection.parts.filter((id) =>
      this.doc.parts.some((part) => part.id === id && isPoint(part)),
    );
    if (loads.length === 0) this.state.say('Take a lamp, fan, outlet or appliance in hand.');
    else this.view.getState().setMode({ kind: 'load', loads });
  }

  moveLoad(loads: readonly string[], device: string): void {
    this.view.getState().setMode(REST);
    this.do(moveLoad(this.doc, loads, device, this.newId));
  }

  /** Opens what is written at a part, or the rating that several share. A part that this face does not draw is edited at the sheet's corner. */
  editPart(id: string, parts: readonly string[] = [id], field?: 'place'): void {
    if (!this.mayEdit) return this.state.say('You may read this drawing.');
    const drawn = this.scene().parts.find((candidate) => candidate.id === id);
    if (parts.length === 1) this.state.select({ parts: [id], wires: [] });
    const at = drawn ? { x: drawn.x + drawn.width + 200, y: drawn.y } : { x: 0, y: 0 };
    this.view.getState().setMode({ kind: 'edit', part: id, parts, at, ...(field && { field }) });
  }

  editRun(run: SceneRun): void {
    if (!this.mayEdit || !run.cable) return;
    const at = run.ticks?.at ?? run.points[Math.floor(run.points.length / 2)]!;
    this.view.getState().setMode({ kind: 'edit', cable: run.cable, at: { x: at.x + 400, y: at.y } });
  }

  /** Opens the place of the part in hand, to be written in mm. */
  editPlace(): void {
    const { parts } = this.state.selection;
    if (parts.length === 1) this.editPart(parts[0]!, parts, 'place');
    else this.state.say('Take one part in hand, to write where it stands.');
  }

  /** Enter: writes where the thing in hand is written. */
  edit(): void {
    const { parts, wires } = this.state.selection;
    if (parts[0]) return this.editPart(parts[0], parts);
    const run = this.scene().runs.find((candidate) => candidate.wires.some((wire) => wires.includes(wire)));
    const cable = this.doc.wires.find((wire) => wires.includes(wire.id))?.cable;
    if (run) this.editRun(run);
    else if (cable) this.view.getState().setMode({ kind: 'edit', cable, at: { x: 0, y: 0 } });
    else this.state.say('Nothing that is written is in hand.');
  }

  /** The cable at the terminal in hand, to edit it by key. */
  editCable(): void {
    const { terminal, wires } = this.state.selection;
    if (!terminal && wires.length > 0) return this.edit();
    const run = this.scene().runs.find(
      (candidate) =>
        candidate.cable && terminal && (sameEnd(candidate.from, terminal) || sameEnd(candidate.to, terminal)),
    );
    const cable = terminal && wiresAt(this.doc, terminal).find((wire) => wire.cable)?.cable;
    if (run) this.editRun(run);
    else if (cable && this.mayEdit) this.view.getState().setMode({ kind: 'edit', cable, at: { x: 0, y: 0 } });
    else this.state.say('No cable ends at the terminal in hand.');
  }
}
