'use client';

import { useCallback, useEffect, useRef, useState } from 'react';
import { newUuid } from '@/components/sheet/identity';
import { callApi } from '@/lib/shared/api-client';
import type { UploadList, UploadPatch, UploadView } from '@/lib/shared/uploads';
import { sendPicture, type Shows } from './picture-api';

/** A picture on its way to the server, or one that did not get there. */
export interface Sending {
  id: string;
  name: string;
  state: 'waiting' | 'sending' | 'failed';
  /** why it did not get there, and what to do */
  message?: string;
  /** the same file may get there later */
  again: boolean;
}

interface Waiting {
  file: File;
  shows: Shows;
}

/** The pictures of a job, those on their way, and what can be done with them. */
export function usePictures(jobId: string, { uploads: first, mayEdit }: UploadList) {
  const [uploads, setUploads] = useState<readonly UploadView[]>(first);
  const [sending, setSending] = useState<readonly Sending[]>([]);
  const [removed, setRemoved] = useState<UploadView | null>(null);
  const [trouble, setTrouble] = useState('');
  const files = useRef(new Map<string, Waiting>());
  const chain = useRef<Promise<void>>(Promise.resolve());
  const changes = useRef<Promise<unknown>>(Promise.resolve());

  useEffect(() => {
    let here = true;
    // Turned back to, a sheet shows the page as it was sent then; pictures may have come since. Without an answer that stays.
    void callApi<UploadList>('GET', `/api/jobs/${jobId}/uploads`).then((answer) => {
      if (!here || !answer.ok) return;
      const { uploads: kept } = answer.data;
      const sentSince = (one: UploadView) => !first.includes(one) && kept.every(({ id }) => id !== one.id);
      setUploads((list) => [...kept, ...list.filter(sentSince)]);
    });
    return () => {
      here = false;
    };
    // eslint-disable-next-line react-hooks/exhaustive-deps -- once, when the sheet opens
  }, [jobId]);

  const mark = useCallback(
    (id: string, change: Partial<Sending> | null) =>
      setSending((list) =>
        change ? list.map((one) => (one.id === id ? { ...one, ...change } : one)) : list.filter((one) => one.id !== id),
      ),
    [],
  );

  const send = useCallback(
    async (id: string) => {
      const waiting = files.current.get(id);
      if (!waiting) return;
      mark(id, { state: 'sending' });
      const answer = await sendPicture(jobId, id, waiting.file, waiting.shows);
      if (answer.ok) {
        files.current.delete(id);
        setUploads((list) => [...list.filter((one) => one.id !== id), answer.data]);
        mark(id, null);
      } else {
        const again = answer.offline || answer.refusal.error === 'too-many' || answer.refusal.error === 'failed';
        mark(id, { state: 'failed', message: answer.refusal.message, again });
      }
    },
    [jobId, mark],
  );

  /** One after the other, in the order in which they were chosen. */
  const queue = useCallback(
    (id: string) => {
      mark(id, { state: 'waiting', message: undefined });
      chain.current = chain.current.then(() => send(id));
    },
    [mark, send],
  );

  const add = (chosen: Iterable<File>, shows: Shows) => {
    const fresh = [...chosen].map((file) => ({ id: newUuid(), file }));
    for (const { id, file } of fresh) files.current.set(id, { file, shows });
    setSending((list) => [
      ...list,
      ...fresh.map(({ id, file }): Sending => ({ id, name: file.name, state: 'waiting', again: true })),
    ]);
    for (const { id } of fresh) queue(id);
  };

  const forget = (id: string) => {
    files.current.delete(id);
    mark(id, null);
  };

  const write = async (id: string, patch: UploadPatch): Promise<boolean> => {
    const answer = await callApi<UploadView>('PATCH', `/api/uploads/${id}`, patch);
    if (!answer.ok) {
      setTrouble(answer.refusal.message);
      return false;
    }
    setTrouble('');
    const { data } = answer;
    setUploads((list) => {
      const others = list.filter((one) => one.id !== id);
      return data.removed ? others : [...others, data].sort((a, b) => (a.at < b.at ? -1 : a.at > b.at ? 1 : 0));
    });
    if (patch.removed !== undefined) setRemoved(patch.removed ? data : null);
    return true;
  };

  /** One after the other: an answer that overtook another would show what has been changed since. */
  const change = (id: string, patch: UploadPatch): Promise<boolean> => {
    const written = changes.current.then(() => write(id, patch));
    changes.current = written;
    return written;
  };

  return { uploads, sending, removed, trouble, mayEdit, add, retry: queue, forget, change };
}

export type Pictures = ReturnType<typeof usePictures>;
