import type { ReactNode } from 'react';
import { PaperMarks } from '@/components/frame/paper-marks';
import { Note } from '@/components/ui/note';
import type { Picture } from '@/diagram/paper/crop';

interface LessonSectionProps {
  wrong: Picture;
  right: Picture;
  /** heading and message of the finding in the wrong home */
  finding: { heading: string; message: string; conditions: readonly string[] };
  /** the wrong drawing in words */
  shows: string;
  /** what is otherwise in the right one */
  difference: string;
  notices: readonly string[];
}

/** px for 1/100 mm: lettering of 11 px at the least, of 15 px at the most */
const SCALE = { least: 0.0322, most: 0.044 } as const;
/** px that a phone has for a drawing */
const PHONE = 320;
/** px that the words under a drawing need */
const WORDS = 300;

const px = (length: number, scale: number): number => Math.round(length * scale);

function Drawing({ picture: { crop, groups }, name, words }: { picture: Picture; name: string; words: string }) {
  const svg = (
    <svg
      role="img"
      aria-label={words}
      viewBox={`${crop.x} ${crop.y} ${crop.width} ${crop.height}`}
      className="block h-auto max-w-full"
      style={{ width: px(crop.width, SCALE.most), minWidth: px(crop.width, SCALE.least) }}
    >
      <PaperMarks groups={groups} />
    </svg>
  );
  const frame = 'w-fit max-w-full overflow-x-auto border border-hair bg-paper';
  if (px(crop.width, SCALE.least) <= PHONE) return <div className={frame}>{svg}</div>;
  // Too wide for a phone: it is moved under the eye, with the keyboard too.
  return (
    <div role="group" aria-label={`${name}, drawing`} tabIndex={0} className={frame}>
      {svg}
    </div>
  );
}

function Side({
  name,
  picture,
  words,
  children,
}: {
  name: string;
  picture: Picture;
  words: string;
  children: ReactNode;
}) {
  return (
    <section
      aria-label={name}
      className="min-w-0 flex-1"
      style={{ flexBasis: Math.max(px(picture.crop.width, SCALE.least), WORDS) }}
    >
      <h3 className="mb-2 text-head font-bold">{name}</h3>
      <Drawing picture={picture} name={name} words={words} />
      <div className="mt-3 max-w-[68ch] text-[14px] leading-[22px]">{children}</div>
    </section>
  );
}

/** A rule in two small drawings: the fault ringed in red pencil, and the same put right. */
export function LessonSection({ wrong, right, finding, shows, difference, notices }: LessonSectionProps) {
  return (
    <section aria-labelledby="lesson" className="border-t-2 border-ink pt-3">
      <h2 id="lesson" className="mb-3 text-head font-bold">
        On the sheet
      </h2>
      <div className="flex flex-wrap gap-x-8 gap-y-6">
        <Side name="Wrong" picture={wrong} words={`${shows} Ringed in red: ${finding.heading}.`}>
          <Note tone="finding" heading={finding.heading} level={4} meta={`holds on ${finding.conditions.join(', ')}`}>
            {finding.message}
          </Note>
        </Side>
        <Side name="Right" picture={right} words={`The same, put right. ${difference}`}>
          <p>{difference}</p>
          {notices.map((notice) => (
            <p key={notice} className="mt-2 inline-block border-2 border-ink px-3 py-1 font-bold">
              {notice}
            </p>
          ))}
        </Side>
      </div>
    </section>
  );
}
