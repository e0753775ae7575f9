'use client';

import Link from 'next/link';
import { useCallback, useMemo, useRef, useState } from 'react';
import { ReactFlowProvider } from 'reactflow';
import { SheetFrame } from '@/components/frame/sheet-frame';
import { jobTabs } from '@/components/frame/tabs';
import { Strip } from '@/components/sheet/foot/strip';
import { SaveStateView } from '@/components/sheet/save-state-view';
import { TroubleStrip } from '@/components/sheet/trouble-strip';
import { useDrawing, useSheet, type Me } from '@/components/sheet/use-drawing';
import { buttonClass } from '@/components/ui/button';
import { WaitLine } from '@/components/ui/wait-line';
import { walkFromSources } from '@/diagram/commands/walk';
import { buildScene } from '@/diagram/layout/build-scene';
import { connectionPages, type ConnectionPage } from '@/diagram/layout/connections-scene';
import { nextSetting, settingsOf } from '@/diagram/rehearsal/settings';
import { partName } from '@/diagram/rehearsal/words';
import { CONDITION_WORDS } from '@/diagram/rehearsal/say-change';
import type { DrawingView } from '@/lib/shared/drawings';
import { readAddress } from './address';
import { RehearsalCanvas } from './canvas/rehearsal-canvas';
import { ConditionsRow } from './conditions-row';
import { RehearsalLegend } from './legend';
import { RehearsalMargin } from './rehearsal-margin';
import type { Rehearser } from './rehearser';
import { sayStation } from './say-station';
import {
  createRehearsalStore,
  RehearsalProvider,
  stationIn,
  stationIndex,
  useRehearsal,
  useRehearsalStore,
  walkIn,
} from './state';
import { TimeLine } from './time-line';
import { useAddressBar, useAnswers } from './use-answers';
import { REHEARSAL_KEYS, useRehearsalKeys } from './use-keys';
import { usePlay } from './use-play';
import { Zoom } from './zoom';

const NO_NOTES: readonly never[] = [];

interface RehearsalProps {
  view: DrawingView;
  me: Me;
  /** the query of the address, as it was opened */
  query: string;
  /** for tests: where answers come from */
  makeRehearser?: () => Rehearser;
}

function OnStore({ view, me, makeRehearser }: Omit<RehearsalProps, 'query'>) {
  const drawing = useDrawing(view, me);
  const store = useRehearsalStore();
  const document = useSheet(drawing.store, (state) => state.document);
  const titleBlock = useSheet(drawing.store, (state) => state.titleBlock);
  const mayEdit = useSheet(drawing.store, (state) => state.rights.edit);
  const askAgain = useAnswers(store, document, makeRehearser);
  useAddressBar(store);
  const answer = useRehearsal((state) => state.answer);
  const failure = useRehearsal((state) => state.failure);
  const faults = useRehearsal((state) => state.faults);
  const hand = useRehearsal((state) => state.hand);
  const said = useRehearsal((state) => state.said);
  const wantedPlace = useRehearsal((state) => state.place);
  const walk = useRehearsal(walkIn);
  const station = useRehearsal(stationIn);
  const index = useRehearsal(stationIndex);
  const sheet = useRef<HTMLDivElement>(null);

  const pages = useMemo(() => connectionPages(document), [document]);
  const page = pages.find(({ place }) => place === wantedPlace) ?? null;
  const place = page?.place ?? null;
  const scene = useMemo(
    () => buildScene(document, place === null ? 'overview' : 'connections', place === null ? {} : { place }),
    [document, place],
  );
  const parts = useMemo(() => new Map(document.parts.map((part) => [part.id, part])), [document]);
  const cableOf = useMemo(
    () => new Map(document.wires.flatMap(({ id, cable }) => (cable === undefined ? [] : [[id, cable] as const]))),
    [document],
  );
  const conductors = useMemo(() => walkFromSources(document), [document]);
  const play = usePlay(store);

  const otherFace = useCallback(() => {
    const state = store.getState();
    if (state.place !== null) return state.set({ place: null });
    const at = parts.get(state.hand ?? '')?.place;
    const found = pages.find((candidate) => candidate.place === at) ?? pages[0];
    if (found) state.set({ place: found.place });
  }, [store, parts, pages]);
  const onKeyDown = useRehearsalKeys({ store, document, conductors, scene, play, otherFace });

  const onPart = useCallback(
    (id: string) => {
      const part = parts.get(id);
      if (!part) return;
      sheet.current?.focus({ preventScroll: true });
      const state = store.getState();
      const now = state.stance?.moved[id] ?? state.answer?.settings[id];
      if (settingsOf(part).length > 0 && now !== undefined) state.operate(id, nextSetting(part, now));
      else state.take(id);
    },
    [store, parts],
  );
  const onGround = useCallback(() => {
    sheet.current?.focus({ preventScroll: true });
    store.getState().take(null);
  }, [store]);

  const fault = faults.at(-1);
  const faultPart = fault && parts.get(fault.at);
  const condition = answer ? CONDITION_WORDS[answer.condition] : '';
  const stepSaid = walk ? sayStation(walk, index) : '';
  const empty = document.parts.length === 0;
  const inHand = parts.get(hand ?? '');
  const hint = mayEdit ? 'Click, tap or Enter turns a switch.' : 'You may rehearse; nothing is changed.';
  const faces = pages.length > 0 && <FaceChoice pages={pages} place={place} />;
  return (
    <SheetFrame
      tabs={jobTabs(view.jobId)}
      current="rehearsal"
      who={me.initials}
      kind={`Rehearsal${condition ? `, ${condition}` : ''}${page ? `, ${page.name}` : ''}`}
      saveState={<SaveStateView drawing={drawing} />}
      titleBlock={titleBlock}
      practice={{ id: document.practice, supply: document.supply }}
      stillLive={
        answer && answer.onBattery.length > 0
          ? `Live from ${answer.onBattery.map((id) => partName(document, parts.get(id)!)).join(', ')} now.`
          : undefined
      }
      fit="screen"
      keys={REHEARSAL_KEYS}
      strip={<TroubleStrip drawing={drawing} />}
      marginLabel={walk ? 'The steps' : inHand ? `${partName(document, inHand)} in hand` : 'In words'}
      margin={<RehearsalMargin drawing={drawing} faces={faces} onAgain={askAgain} />}
      foot={
        <div className="flex h-full flex-col gap-x-4 gap-y-1 lap:flex-row">
          {!answer && !failure && !empty ? (
            <WaitLine>{`Working out ${document.parts.length} parts`}</WaitLine>
          ) : walk ? (
            <TimeLine walk={walk} />
          ) : (
            !empty && (
              <>
                {place === null && <Strip scene={scene} notes={NO_NOTES} />}
                <div className="flex min-w-0 flex-1 flex-col justify-between gap-1">
                  <RehearsalLegend />
                  <p className="truncate" title={said}>
                    {said || hint}
                  </p>
                </div>
              </>
            )
          )}
        </div>
      }
    >
      <h1 className="sr-only">Rehearsal: {titleBlock.title}</h1>
      <p className="sr-only" aria-live="polite" role="status">
        {walk ? stepSaid : said}
      </p>
      {empty ? (
        <div className="flex max-w-[60ch] flex-col items-start gap-3 p-6">
          <p>Nothing is drawn yet, so there is nothing to rehearse.</p>
          <Link className={buttonClass()} href={`/jobs/${view.jobId}/${mayEdit ? 'survey' : 'overview'}`}>
            {mayEdit ? 'Start from the survey' : 'To the overview'}
          </Link>
        </div>
      ) : (
        <div
          ref={sheet}
          role="application"
          aria-roledescription="rehearsal"
          aria-label={`Rehearsal of ${document.title}. Arrows follow the conductors, Enter turns what is in hand, question mark lists the keys.`}
          aria-busy={!answer}
          tabIndex={0}
          className="absolute inset-0 outline-offset-[-2px]"
          onKeyDown={onKeyDown}
        >
          <p className="sr-only" aria-live="polite">
            {inHand ? `${partName(document, inHand)} in hand` : ''}
          </p>
          <div aria-hidden="true" className="absolute inset-0">
            <RehearsalCanvas
              scene={scene}
              parts={parts}
              cableOf={cableOf}
              answer={answer}
              station={station}
              fault={fault ?? null}
              faultName={faultPart ? partName(document, faultPart) : ''}
              hand={hand}
              show={fault?.at ?? hand}
              onPart={onPart}
              onGround={onGround}
            />
          </div>
          <Zoom />
          <div className="absolute top-2 left-2 z-[6] bg-paper lap:hidden">
            <ConditionsRow named={false} />
          </div>
        </div>
      )}
    </SheetFrame>
  );
}

/** Which face is rehearsed: the overview, or the connections of one place. */
function FaceChoice({ pages, place }: { pages: readonly ConnectionPage[]; place: string | null }) {
  const store = useRehearsalStore();
  return (
    <label className="flex items-center gap-3 bg-paper">
      <span className="text-grey max-sm:sr-only">Face</span>
      <select
        className="min-h-6 max-w-full border border-rule bg-paper px-1 py-[2px] text-ink pointer-coarse:min-h-11"
        value={place ?? ''}
        onChange={(event) => store.getState().set({ place: event.target.value || null })}
      >
        <option value="">overview</option>
        {pages.map((each) => (
          <option key={each.place} value={each.place}>
            connections, {each.name}
          </option>
        ))}
      </select>
    </label>
  );
}

/** The rehearsal: the home put through outages, switching and faults, on its own drawing. */
export function RehearsalSheet({ query, ...rest }: RehearsalProps) {
  const [store] = useState(() => createRehearsalStore(readAddress(new URLSearchParams(query))));
  return (
    <RehearsalProvider value={store}>
      <ReactFlowProvider>
        <OnStore {...rest} />
      </ReactFlowProvider>
    </RehearsalProvider>
  );
}
