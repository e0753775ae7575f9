'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useRef, useState, useTransition } from 'react';
import type { JobQuery } from '@/lib/shared/jobs';
import { queryString } from './query-string';

/** ms without a key before a search is sent */
const PAUSE = 250;

/** The register's question lives in the address, so that back, reload and a shared link all give the same rows. */
export function useRegisterQuery(query: JobQuery) {
  const router = useRouter();
  const [pending, start] = useTransition();
  const [typed, setTyped] = useState(query.search);
  const timer = useRef<ReturnType<typeof setTimeout>>(undefined);

  const ask = (change: Partial<JobQuery>) => {
    clearTimeout(timer.current);
    const text = queryString({ ...query, search: typed.trim(), page: 1, ...change });
    start(() => router.replace(text ? `/jobs?${text}` : '/jobs', { scroll: false }));
  };

  useEffect(() => () => clearTimeout(timer.current), []);

  return {
    typed,
    pending,
    ask,
    type(text: string) {
      setTyped(text);
      clearTimeout(timer.current);
      timer.current = setTimeout(() => ask({ search: text.trim() }), PAUSE);
    },
    clear() {
      setTyped('');
      ask({ search: '', filter: 'all' });
    },
    sort: (sort: JobQuery['sort']) =>
      ask({ sort, direction: query.sort === sort && query.direction === 'asc' ? 'desc' : 'asc' }),
  };
}
