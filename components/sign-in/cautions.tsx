const cautions = [
  'A design aid. It gives nobody permission to work.',
  'Work on fixed wiring is for a licensed person, under local code. The code wins over any rule here.',
  'Isolate both sources, lock off, prove dead. A backup source keeps circuits live after the main switch is off.',
  'Battery terminals are never dead.',
  'Every value is to be verified by test.',
];

/** What is to be read before anyone touches a wire: whole, on every width, never behind a tick box. */
export function Cautions() {
  return (
    <section aria-labelledby="cautions" className="p-4">
      <h2 id="cautions" className="text-small font-bold tracking-[0.16em] uppercase">
        Before anyone touches a wire
      </h2>
      <ol className="mt-2 flex flex-col gap-1">
        {cautions.map((caution, i) => (
          <li key={caution} className="grid grid-cols-[24px_1fr] leading-5">
            <span className="text-grey" aria-hidden="true">
              {i + 1}
            </span>
            {caution}
          </li>
        ))}
      </ol>
    </section>
  );
}
