'use client';

import { useEffect, useId, useState } from 'react';
import { TextField } from '@/components/ui/field';
import { callApi } from '@/lib/shared/api-client';

export interface ClientSuggestion {
  id: string;
  name: string;
  phone: string;
  email: string;
}

interface ClientFieldProps {
  value: string;
  error?: string;
  onChange(value: string): void;
  /** a client that the team already has was named */
  onKnown(client: ClientSuggestion): void;
}

/** ms without a key before clients are looked up */
const PAUSE = 200;

/** The client's name, with the team's own clients as suggestions. Without an answer it is a plain field. */
export function ClientField({ value, error, onChange, onKnown }: ClientFieldProps) {
  const list = useId();
  const [clients, setClients] = useState<readonly ClientSuggestion[]>([]);
  const typed = value.trim();
  useEffect(() => {
    if (typed === '') return;
    const abort = new AbortController();
    const timer = setTimeout(() => {
      callApi<ClientSuggestion[]>('GET', `/api/clients?search=${encodeURIComponent(typed)}`, undefined, abort.signal).then(
        (answer) => answer.ok && setClients(answer.data),
        () => undefined, // superseded by the next key
      );
    }, PAUSE);
    return () => {
      clearTimeout(timer);
      abort.abort();
    };
  }, [typed]);

  return (
    <>
      <TextField
        label="Client"
        name="client"
        list={list}
        autoComplete="off"
        maxLength={120}
        value={value}
        error={error}
        hint="A client of this name in your team is used again."
        onChange={(event) => {
          onChange(event.target.value);
          const known = clients.find((client) => client.name === event.target.value);
          if (known) onKnown(known);
        }}
      />
      <datalist id={list}>
        {clients.map((client) => (
          <option key={client.id} value={client.name} />
        ))}
      </datalist>
    </>
  );
}
