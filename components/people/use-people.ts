'use client';

import { useState } from 'react';
import { callApi } from '@/lib/shared/api-client';
import type { ErrorAnswer } from '@/lib/shared/errors';
import type { PersonRole, PersonRow } from '@/lib/shared/people';

/** A link that is shown this once, to be passed on by the person who asked for it. */
export interface GivenLink {
  name: string;
  link: string;
  expiresAt: string;
}

interface Invitation {
  name: string;
  email: string;
  roles: PersonRole[];
}

/** The people of the team as this browser knows them, and what an admin does to them. */
export function usePeople(first: readonly PersonRow[]) {
  const [people, setPeople] = useState(first);
  const [link, setLink] = useState<GivenLink | null>(null);
  const [refusal, setRefusal] = useState<ErrorAnswer | null>(null);
  const [fields, setFields] = useState<Record<string, string>>({});
  const [busy, setBusy] = useState<string | null>(null);

  const put = (row: PersonRow) =>
    setPeople((before) =>
      [...before.filter(({ id }) => id !== row.id), row].sort((a, b) => a.name.localeCompare(b.name)),
    );
  const ask = async <T>(who: string, path: string, method: 'POST' | 'PATCH', body?: unknown): Promise<T | null> => {
    setBusy(who);
    setRefusal(null);
    setFields({});
    const answer = await callApi<T>(method, path, body);
    setBusy(null);
    if (answer.ok) return answer.data;
    setRefusal(answer.refusal);
    setFields(answer.refusal.fields ?? {});
    return null;
  };

  return {
    people,
    link,
    refusal,
    fields,
    busy,
    closeLink: () => setLink(null),
    refuse(message: Record<string, string>) {
      setRefusal(null);
      setFields(message);
    },
    async invite(invitation: Invitation): Promise<boolean> {
      const made = await ask<{ person: PersonRow; link: string; expiresAt: string }>('new', '/api/people', 'POST', invitation);
      if (!made) return false;
      put(made.person);
      setLink({ name: made.person.name, link: made.link, expiresAt: made.expiresAt });
      return true;
    },
    async change(person: PersonRow, patch: { roles?: PersonRole[]; active?: boolean }) {
      const row = await ask<PersonRow>(person.id, `/api/people/${person.id}`, 'PATCH', patch);
      if (row) put(row);
      return row !== null;
    },
    async renew(person: PersonRow) {
      const made = await ask<{ link: string; expiresAt: string }>(person.id, `/api/people/${person.id}/link`, 'POST');
      if (made) setLink({ name: person.name, ...made });
    },
  };
}
export type People = ReturnType<typeof usePeople>;
