import { Fragment } from 'react';
import { SymbolGlyph } from '@/components/frame/symbol-glyph';
import type { Kind, Part } from '@/diagram/document/schema';
import { symbolFor } from '@/diagram/symbols';

/** All lengths in 1/100 mm, on the 2.5 mm module. */
const WIDTH = 24_000;
const HEIGHT = 22_500;
const COLUMN = 7_000;
const BAR = 7_750;
const BACKUP_BAR = 21_500;
const EDGE = 22_000;
const BOARD = { top: 12_500, bottom: 14_000 };
const LOADS = 15_750;

interface Branch {
  /** from the room's left edge */
  x: number;
  load: Kind;
  /** what stands between board and load */
  through?: 'regulator';
  switched?: boolean;
}

interface Room {
  name: string;
  x: number;
  mains: readonly (Branch & { way: number })[];
  backup: Branch & { way: number };
}

const rooms: readonly Room[] = [
  {
    name: 'Kitchen',
    x: 1_000,
    mains: [
      { way: 1, x: 1_000, load: 'lamp', switched: true },
      { way: 2, x: 2_250, load: 'appliance' },
    ],
    backup: { way: 6, x: 3_500, load: 'lamp', switched: true },
  },
  {
    name: 'Study',
    x: 7_500,
    mains: [
      { way: 3, x: 1_000, load: 'lamp', switched: true },
      { way: 4, x: 2_250, load: 'socket' },
    ],
    backup: { way: 7, x: 3_500, load: 'fan', through: 'regulator', switched: true },
  },
  { name: 'Loft', x: 14_000, mains: [{ way: 5, x: 1_750, load: 'socket' }], backup: { way: 8, x: 3_500, load: 'lamp', switched: true } },
];
const FEED = 4_500;

const symbol = (kind: Kind) => symbolFor({ kind } as Part, 'overview');

function Run({ d, heavy }: { d: string; heavy?: boolean }) {
  return <path d={d} className="fill-none stroke-ink" strokeWidth={heavy ? 5 : 1.8} vectorEffect="non-scaling-stroke" />;
}

/** A conductor of the backup source: an outline with a light core. */
function Cased({ d }: { d: string }) {
  const common = { d, vectorEffect: 'non-scaling-stroke', strokeLinejoin: 'round' } as const;
  return (
    <>
      <path {...common} className="fill-none stroke-ink" strokeWidth={5.4} />
      <path {...common} className="fill-none stroke-paper" strokeWidth={2.8} />
    </>
  );
}

function Ring({ x, y, way }: { x: number; y: number; way: number }) {
  return (
    <g>
      <circle cx={x} cy={y} r={400} className="fill-paper stroke-ink" strokeWidth={1.4} vectorEffect="non-scaling-stroke" />
      <text x={x} y={y + 125} fontSize={360} textAnchor="middle" className="fill-ink">
        {way}
      </text>
    </g>
  );
}

/** A symbol hung by its upper terminal at (x, y). */
function Hung({ kind, x, y }: { kind: Kind; x: number; y: number }) {
  const data = symbol(kind);
  const top = Object.values(data.terminals).find((terminal) => terminal.side === 'up')!;
  return <SymbolGlyph symbol={data} x={x - top.x} y={y - top.y} />;
}

function Load({ branch, x, cased }: { branch: Branch; x: number; cased?: boolean }) {
  const Line = cased ? Cased : Run;
  return (
    <>
      {branch.switched ? (
        <>
          <Line d={`M${x} 13750V${LOADS}`} />
          <Hung kind="switch" x={x} y={13_000} />
        </>
      ) : (
        <Line d={`M${x} ${BOARD.top}V${LOADS}`} />
      )}
      {branch.through && <Hung kind={branch.through} x={x} y={14_500} />}
      <Hung kind={branch.load} x={x} y={LOADS} />
    </>
  );
}

function RoomDrawing({ room }: { room: Room }) {
  const feed = room.x + FEED;
  const backup = room.x + room.backup.x;
  return (
    <g>
      <path
        d={`M${room.x} 11750H${room.x + 5_500}V17500H${room.x}z`}
        className="fill-none stroke-rule"
        strokeWidth={1}
        strokeDasharray="7 4"
        vectorEffect="non-scaling-stroke"
      />
      <path
        d={`M${room.x + 500} ${BOARD.top}H${room.x + 5_000}V${BOARD.bottom}H${room.x + 500}z`}
        className="fill-paper stroke-ink"
        strokeWidth={1.4}
        vectorEffect="non-scaling-stroke"
      />
      <text x={room.x + 300} y={17_150} fontSize={360} letterSpacing={45} className="fill-grey">
        {room.name.toUpperCase()}
      </text>
      {room.mains.map((branch) => {
        const x = room.x + branch.x;
        return (
          <Fragment key={branch.way}>
            <Run d={`M${x} ${BAR}V${BAR + 500}M${x} ${BAR + 1_750}V${branch.switched ? 13_000 : LOADS}`} />
            <Hung kind="mcb" x={x} y={BAR + 500} />
            <Ring x={x} y={BAR + 2_500} way={branch.way} />
            <Load branch={branch} x={x} />
          </Fragment>
        );
      })}
      <Cased d={`M${feed} ${BACKUP_BAR}V20750M${feed} 19500V13000H${backup}`} />
      <SymbolGlyph symbol={symbol('mcb')} x={feed - 500} y={19_500} turn={180} />
      <Ring x={feed} y={18_500} way={room.backup.way} />
      <Load branch={room.backup} x={backup} cased />
    </g>
  );
}

/** A home with two sources, unlabelled but for their names: mains from above, the backup's board along the foot. */
export function TwoSources({ className = '' }: { className?: string }) {
  return (
    <svg viewBox={`0 0 ${WIDTH} ${HEIGHT}`} preserveAspectRatio="xMidYMid slice" className={className} aria-hidden="true" fontSize={360}>
      <Run d={`M${COLUMN} 1250V1500M${COLUMN} 2500V2750M${COLUMN} 3750V4000M${COLUMN} 5250V6250M${COLUMN} 7500V${BAR}`} />
      <SymbolGlyph symbol={symbol('supply')} x={COLUMN - 500} y={500} />
      <Hung kind="fuse" x={COLUMN} y={1_500} />
      <Hung kind="meter" x={COLUMN} y={2_750} />
      <Hung kind="isolator" x={COLUMN} y={4_000} />
      <Hung kind="rcd" x={COLUMN} y={6_250} />
      <text x={COLUMN + 900} y={1_100} className="fill-grey">
        mains
      </text>
      <Run d={`M1250 ${BAR}H17500`} heavy />

      <Run d={`M${COLUMN} 5750H11250M12500 5750H17000M18000 5000V4750`} />
      <circle cx={COLUMN} cy={5_750} r={110} className="fill-ink" />
      <SymbolGlyph symbol={symbol('mcb')} x={11_375} y={5_125} turn={270} />
      <Cased d={`M19000 5750H${EDGE}V8250`} />
      <Cased d={`M${EDGE} 9500V${BACKUP_BAR}H2500`} />
      <SymbolGlyph symbol={symbol('inverter')} x={17_000} y={5_000} />
      <Hung kind="fuse" x={18_000} y={3_500} />
      <SymbolGlyph symbol={symbol('battery')} x={17_500} y={2_500} />
      <Hung kind="rcd" x={EDGE} y={8_250} />
      <text x={19_200} y={3_000} className="fill-grey">
        backup
      </text>
      {rooms.map((room) => (
        <RoomDrawing key={room.name} room={room} />
      ))}
    </svg>
  );
}
