'use client';

import { useMemo, useState } from 'react';
import { useStore } from 'zustand';
import { ConditionPlot } from '@/components/plots/conditions';
import { DropPlot } from '@/components/plots/drop';
import { HoursPlot } from '@/components/plots/hours';
import { TimeCurrentPlot } from '@/components/plots/time-current';
import type { DrawingStore } from '@/components/sheet/store';
import type { Installation } from '@/diagram/document/schema';
import type { BackupPlot } from '@/diagram/schedules/backup-plot';
import type { Worked } from '@/diagram/schedules/work-out';
import { tableIn, type Desk } from './desk';
import { DropLoads } from './drop-loads';

interface PlotsProps {
  desk: Desk;
  worked: Worked;
  drawing: DrawingStore;
  document: Installation;
  mayEdit: boolean;
}

/** The way that the row in hand belongs to. */
export function useWayInHand(desk: Desk): string | null {
  return useStore(desk, (state) => {
    const { hand } = state;
    const row = hand && tableIn(state, hand.table)?.rows.find(({ id }) => id === hand.row);
    return row?.way ?? null;
  });
}

function Hours({ plot, ...rest }: Omit<PlotsProps, 'worked'> & { plot: BackupPlot }) {
  const [off, setOff] = useState<ReadonlySet<string>>(new Set());
  // What is no longer backed up cannot be switched off for the question.
  const standing = useMemo(() => new Set(plot.loads.map(({ id }) => id).filter((id) => off.has(id))), [plot, off]);
  return (
    <HoursPlot
      plot={plot}
      off={standing}
      controls={<DropLoads plot={plot} off={standing} onOff={setOff} {...rest} />}
    />
  );
}

const pair = 'grid gap-x-10 gap-y-8 min-[800px]:grid-cols-2';

/** The pictures that belong to the schedule lying open, fed by the row in hand. */
export function Plots({ worked, ...rest }: PlotsProps) {
  const schedule = useStore(rest.desk, (state) => state.schedule);
  const inHand = useWayInHand(rest.desk);
  const way = inHand ?? (schedule === 'ways' ? (worked.tables.ways.rows[0]?.id ?? null) : null);
  const plot = way === null ? undefined : worked.plots[way];
  if (schedule === 'designations') return null;
  if (schedule === 'backup')
    return (
      <div className={pair}>
        {worked.backups.map((backup) => (
          <Hours key={backup.inverter} plot={backup} {...rest} />
        ))}
        {worked.conditions.length > 0 && <ConditionPlot loads={worked.conditions} />}
      </div>
    );
  return (
    <div className={pair}>
      {plot && schedule !== 'loads' && <TimeCurrentPlot plot={plot} />}
      {plot && <DropPlot plot={plot} />}
      {schedule === 'loads' && worked.conditions.length > 0 && <ConditionPlot loads={worked.conditions} />}
      {!plot && schedule === 'cables' && <p className="text-grey">Take a cable of a way in hand to see its curves.</p>}
    </div>
  );
}
