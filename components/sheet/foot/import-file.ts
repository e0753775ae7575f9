import { diff, isEmptyPatch } from '@/diagram/document/patch';
import { readWhatCan } from '@/diagram/document/salvage';
import { readDocument, type DocumentError, type Installation } from '@/diagram/document/schema';
import type { Command } from '@/diagram/commands/types';

/** Bytes of a change that the server takes. */
const LARGEST = 512_000;

/** Why a file is no drawing, and what could be read of it where that is anything. */
export interface NoDrawing {
  errors: DocumentError[];
  readable?: Installation;
}

/** A file as a change of the drawing, or every reason why it is none. A bad file changes nothing. */
export function importCommand(doc: Installation, name: string, text: string): Command | NoDrawing {
  let data: unknown;
  try {
    data = JSON.parse(text);
  } catch (error) {
    return {
      errors: [{ path: name, message: `This is no JSON: ${error instanceof Error ? error.message : String(error)}` }],
    };
  }
  const read = readDocument(data);
  if (!read.ok) {
    const { document, errors } = readWhatCan(data);
    return document.parts.length > 0 ? { errors, readable: document } : { errors };
  }
  const patch = diff(doc, read.document);
  if (isEmptyPatch(patch)) return { errors: [{ path: name, message: 'The file is the drawing as it stands.' }] };
  if (JSON.stringify(patch).length > LARGEST)
    return { errors: [{ path: name, message: 'The file is larger than one change may be (512 kB).' }] };
  return { label: `Import ${name}`.slice(0, 160), patch };
}
