'use client';

import { useEffect, useRef, useState } from 'react';
import { findingsNews } from '@/diagram/outline/findings-news';
import type { Examination } from '@/diagram/rules/examination';

/** ms of rest before findings are spoken: while somebody draws on, only the last state is told */
const REST = 1200;

/** Tells a screen reader, politely and once the hands rest, which findings came and went. */
export function FindingsVoice({ examination }: { examination: Examination | null }) {
  const told = useRef<Examination | null>(null);
  const [words, setWords] = useState('');
  useEffect(() => {
    if (!examination) return;
    const timer = setTimeout(() => {
      const news = findingsNews(told.current?.findings ?? null, examination.findings);
      told.current = examination;
      if (news) setWords(news);
    }, REST);
    return () => clearTimeout(timer);
  }, [examination]);
  return (
    <p className="sr-only" role="log" aria-live="polite" aria-label="Findings">
      {words}
    </p>
  );
}
