import { hasTerminal, polesOf } from '../document/kinds';
import { reaches } from '../terminals/reach';
import { recalled } from './clauses';
import { figuresOf, onMains } from './readings/figures';
import type { Context } from './context';
import type { Part, Wire } from '../document/schema';
import type { Remedy, Rule } from './types';

/** An arrester beside the main switch, where the home's own conductors begin. */
function arrester({ graph, mainSwitch, earth, document }: Context): Remedy[] {
  const id = 'surge-arrester';
  if (
    !mainSwitch ||
    polesOf(mainSwitch) !== 2 ||
    mainSwitch.kind === 'changeover' ||
    earth.mainBar === undefined ||
    graph.parts.has(id)
  )
    return [];
  const bar = graph.partOf[earth.mainBar]!;
  const used = document.wires.flatMap(({ from, to }) => [from, to]).filter(([part]) => part === bar.id);
  const free = String(1 + Math.max(0, ...used.map(([, mark]) => Number(mark))));
  if (!hasTerminal(bar, free)) return [];
  const { place, board } = mainSwitch;
  const part: Part = {
    id,
    kind: 'spd',
    class: 2,
    ...(place !== undefined && { place }),
    ...(board !== undefined && { board }),
  };
  const wire = (mark: 'L' | 'N' | 'E', role: Wire['role'], from: Wire['from']): Wire => ({
    id: `${id}.${mark}`,
    from,
    to: [id, mark],
    role,
  });
  const wires = [
    wire('L', 'line', [mainSwitch.id, '2']),
    wire('N', 'neutral', [mainSwitch.id, '4']),
    wire('E', 'earth', [bar.id, free]),
  ];
  if (wires.some((each) => graph.wires.has(each.id))) return [];
  return [{ label: 'Fit a surge arrester behind the main switch', patch: { set: { parts: [part], wires } } }];
}

/** No surge arrester that the mains line and the earth both reach. */
export const noSpd: Rule = {
  meta: {
    id: 'no-spd',
    severity: 'advice',
    group: 'overload',
    title: 'Nothing at the origin takes up a surge',
    clauses: [recalled('IEC 60364-4-44', '443.4'), recalled('BS 7671', '443.4.1')],
    lesson:
      'Lightning a kilometre away sends thousands of volts along the line for a few millionths of a second. Lamp ' +
      'drivers, routers and the inverter die of it together; an arrester at the origin leads it to earth before ' +
      'it is inside.',
    remedy: 'Fit a surge arrester of class 2 beside the main switch, with short leads to line, neutral and earth.',
  },
  *check(context) {
    const { graph, evaluated, earth } = context;
    if (!figuresOf(context).drawn.some(({ source }) => source?.kind === 'mains')) return;
    const takesUp = context.parts('spd').some(({ id }) => {
      const line = graph.node(id, 'L');
      const live = evaluated.some(({ condition, stands }) =>
        stands.some((stand) =>
          condition.sources.some(({ kind }, i) => kind === 'mains' && reaches(stand.line[i]!, line)),
        ),
      );
      return live && reaches(earth.reached, graph.node(id, 'E'));
    });
    if (takesUp) return;
    const at = context.mainSwitch ?? context.parts('supply')[0];
    yield {
      heading: 'There is no surge arrester',
      message:
        'No arrester is joined to the line of the mains and to the earth. A surge from the street reaches everything that is plugged in.',
      parts: at ? [at.id] : [],
      conditions: onMains(context),
      remedies: arrester(context),
    };
  },
};
