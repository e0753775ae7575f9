'use client';

import Link from 'next/link';
import { useEffect, useRef } from 'react';
import { Button } from '@/components/ui/button';
import { Key } from '@/components/ui/key';
import { useSingleKeysOn } from './single-keys';
import type { KeyHelp } from './types';

/** The list behind `?`: the keys of this sheet, and where to switch single letters off. */
export function KeysHelp({ keys, onClose }: { keys: readonly KeyHelp[]; onClose(): void }) {
  const dialog = useRef<HTMLDialogElement>(null);
  const on = useSingleKeysOn();
  useEffect(() => dialog.current?.showModal(), []);
  return (
    <dialog
      ref={dialog}
      aria-label="Keys of this sheet"
      className="m-auto max-h-[90dvh] w-[min(560px,calc(100vw-16px))] border-2 border-ink bg-paper p-6 text-ink backdrop:bg-ink/40"
      onClose={onClose}
      onClick={(event) => event.target === dialog.current && dialog.current.close()}
    >
      <h2 className="text-title font-bold">Keys of this sheet</h2>
      <dl className="mt-4 grid grid-cols-[auto_1fr] items-baseline gap-x-4 gap-y-2">
        {keys.map(({ keys: names, does }) => (
          <div key={does} className="contents">
            <dt className="flex flex-wrap gap-1">
              {names.map((name) => (
                <Key key={name}>{name}</Key>
              ))}
            </dt>
            <dd>{does}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-6 text-grey">
        {on ? 'Single keys act while no field has the focus.' : 'Single keys are switched off.'}{' '}
        <Link href="/account" className="text-ink underline underline-offset-[3px]">
          {on ? 'Switch them off' : 'Switch them on'}
        </Link>
      </p>
      <div className="mt-4">
        <Button onClick={() => dialog.current?.close()}>Close</Button>
      </div>
    </dialog>
  );
}
