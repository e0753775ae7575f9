import { seen } from './clauses';
import { sayBoard, switchboards } from './readings/switchboards';
import type { Rule } from './types';
import { capital } from './readings/words';

/** An enclosure with conductors of two sources and no warning notice. */
export const twoSourcesUnmarked: Rule = {
  meta: {
    id: 'two-sources-unmarked',
    severity: 'advice',
    group: 'separation',
    title: 'Two sources in one enclosure, and no notice',
    clauses: [seen('BS 7671', '514.15.1')],
    lesson:
      'Whoever opens it switches off the breaker he knows. The other half is fed from the battery and stays live under his fingers.',
    remedy: 'Fix a notice: two sources, isolate both.',
  },
  *check(context) {
    if (context.parts('inverter').length === 0) return;
    for (const board of switchboards(context).values()) {
      const { sources } = board;
      if (!sources.has('mains') || !sources.has('backup')) continue;
      const noticed = context.document.notices?.some(
        (notice) =>
          notice.place === board.place &&
          (notice.board === undefined || notice.board === board.board) &&
          notice.text.trim() !== '',
      );
      if (noticed) continue;
      yield {
        heading: `Two sources in ${sayBoard(context, board)}, no notice`,
        message: `${capital(sayBoard(context, board))} holds conductors of mains and of backup, and no warning notice is fixed to it.`,
        parts: [sources.get('mains')!, sources.get('backup')!],
        remedies: [
          {
            label: 'Write the notice',
            patch: {
              set: {
                notices: [
                  ...(context.document.notices ?? []),
                  {
                    place: board.place,
                    ...(board.board && { board: board.board }),
                    text: 'Two sources: isolate the mains and the backup before work.',
                  },
                ],
              },
            },
          },
        ],
      };
    }
  },
};
