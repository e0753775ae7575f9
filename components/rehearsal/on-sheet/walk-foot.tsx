'use client';

import { Button } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { WaitLine } from '@/components/ui/wait-line';
import { sayStation } from '../say-station';
import { RehearsalProvider, stationIndex, useRehearsal, walkIn } from '../state';
import { TimeLine } from '../time-line';
import type { ShownWalk } from './shown-walk';

interface WalkFootProps {
  walk: ShownWalk;
  onLeave(): void;
}

function Foot({ walk: { player }, onLeave }: WalkFootProps) {
  const walk = useRehearsal(walkIn);
  const index = useRehearsal(stationIndex);
  const playing = useRehearsal((state) => state.playing);
  const failure = useRehearsal((state) => state.failure);
  const said = useRehearsal((state) => state.said);
  const outcome = useRehearsal((state) => state.answer?.outcome);
  const cannot = failure ?? (outcome && 'cannot' in outcome ? outcome.cannot : null);
  return (
    <div className="flex h-full gap-4 max-lap:flex-col">
      <p role="status" aria-live="polite" className="sr-only">
        {walk ? sayStation(walk, index) : (cannot ?? '')} {said}
      </p>
      {walk ? <TimeLine walk={walk} /> : cannot ? <p className="flex-1">{cannot}</p> : <WaitLine>Walking the fault</WaitLine>}
      <div className="flex shrink-0 items-start gap-2 lap:flex-col">
        <Button disabled={!walk} aria-pressed={playing} onClick={player.toggle}>
          {playing ? 'Stop' : 'Play'} <Key>Space</Key>
        </Button>
        <Button onClick={onLeave}>
          Leave <Key>Esc</Key>
        </Button>
      </div>
    </div>
  );
}

/** The foot of the sheet while it shows a fault walk: its time line, and the way back to drawing. */
export default function WalkFoot(props: WalkFootProps) {
  return (
    <RehearsalProvider value={props.walk.store}>
      <Foot {...props} />
    </RehearsalProvider>
  );
}
