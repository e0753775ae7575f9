import type { ReactNode } from 'react';
import type { PracticeId, Supply } from '@/diagram/document/schema';
import type { TitleBlock } from '@/lib/shared/drawings';

interface TitleBlockPanelProps {
  /** what kind of sheet this is: "Overview, single line" */
  kind: string;
  block: TitleBlock;
  /** "2 / 3" */
  sheet: string;
  practice?: { id: PracticeId; supply: Supply };
  /** what stays live when the main switch is off, where it is known: "Live from G1 when Q0 is off." */
  stillLive?: string;
}

function Cell({ name, children, strong, className = '' }: { name: string; children: ReactNode; strong?: boolean; className?: string }) {
  return (
    <div className={`min-w-0 border-r border-ink px-2 py-1 last:border-r-0 ${className}`}>
      <dt className="text-small leading-[14px] whitespace-nowrap text-grey">{name}</dt>
      <dd dir="auto" className={`truncate leading-[15px] ${strong ? 'font-bold' : ''}`} title={typeof children === 'string' ? children : undefined}>
        {children}
      </dd>
    </div>
  );
}

/** The title block of the sheet, after ISO 7200, with the cautions that never fold away. */
export function TitleBlockPanel({ kind, block, sheet, practice, stillLive }: TitleBlockPanelProps) {
  const drawn = [block.drawnBy, block.drawnOn.slice(0, 10)].filter(Boolean).join(' ');
  return (
    <section aria-label="Title block" className="flex flex-col border-ink wide:w-[540px] wide:shrink-0 wide:border-l-[1.6px] lap:w-[784px]">
      <dl className="grid flex-1 grid-cols-[minmax(0,1fr)_96px_96px] sm:grid-cols-[minmax(0,1fr)_80px_144px_72px_72px_64px_88px] wide:grid-cols-[minmax(0,1fr)_72px_72px_60px_104px] lap:grid-cols-[minmax(0,1fr)_72px_144px_72px_72px_60px_140px]">
        <Cell name={kind} strong>
          {block.title}
        </Cell>
        <Cell name="Number" strong>
          {block.number}
        </Cell>
        <Cell name="Drawn" className="max-sm:hidden wide:max-lap:hidden">
          {drawn || '-'}
        </Cell>
        <Cell name="Checked" className="max-sm:hidden wide:max-lap:hidden">
          {block.checkedBy ?? '-'}
        </Cell>
        <Cell name="Revision" strong className="max-sm:hidden">
          {block.revision}
        </Cell>
        <Cell name="Sheet" strong className="max-sm:hidden">
          {sheet}
        </Cell>
        <Cell name="State" strong>
          {block.state}
        </Cell>
      </dl>
      <div className="flex border-t border-ink text-small leading-[15px]">
        <p className="min-w-0 flex-1 px-2 py-[3px]">
          Design aid, not a permission. Isolate both sources, lock off, prove dead. <br className="max-lap:hidden" />
          {stillLive ?? 'Backup stays live with main switch off.'} Battery terminals are never dead.
        </p>
        {practice && (
          <p className="hidden w-[136px] shrink-0 border-l border-ink px-2 py-[3px] sm:block wide:max-lap:hidden">
            Practice {practice.id}
            <br />
            <span className="whitespace-nowrap">
              {practice.supply.system} {practice.supply.voltage} V {practice.supply.frequency} Hz
            </span>
          </p>
        )}
        <p className="hidden w-[140px] shrink-0 truncate border-l border-ink px-2 py-[3px] sm:block wide:max-lap:w-[104px]">
          {block.team}
          <br />
          <b>Ohmstead</b>
        </p>
      </div>
    </section>
  );
}
