import { fontSizeOf, letterSpacing, type Group, type Mark } from '@/diagram/paper/primitives';
import { themed } from './inks';

/** A screen shows thin strokes paler than paper does. */
const INK = 1.25;

function MarkView({ mark }: { mark: Mark }) {
  if (mark.kind === 'path')
    return (
      <path
        d={mark.d}
        fill={mark.fill ? themed(mark.fill) : 'none'}
        {...(mark.stroke && {
          stroke: themed(mark.stroke),
          strokeWidth: (mark.width ?? 25) * INK,
          strokeLinecap: mark.cap ?? 'round',
          strokeLinejoin: 'round',
          strokeDasharray: mark.dash?.join(' '),
        })}
      />
    );
  return (
    <text
      x={mark.x}
      y={mark.y}
      fontSize={fontSizeOf(mark)}
      fontWeight={mark.bold ? 700 : 400}
      textAnchor={mark.anchor ?? 'start'}
      letterSpacing={letterSpacing(mark) || undefined}
      transform={mark.turn ? `rotate(${90 * mark.turn} ${mark.x} ${mark.y})` : undefined}
      fill={themed(mark.colour)}
    >
      {mark.text}
    </text>
  );
}

/** What is drawn for paper, inside an svg whose unit is 1/100 mm, in the inks of the theme. */
export function PaperMarks({ groups }: { groups: readonly Group[] }) {
  return groups.map((group, i) => (
    <g key={i} transform={`translate(${group.x} ${group.y})${group.turn ? ` rotate(${90 * group.turn})` : ''}`}>
      {group.marks.map((mark, j) => (
        <MarkView key={j} mark={mark} />
      ))}
    </g>
  ));
}
