import type { PracticeId } from '../document/schema';
import { GB } from './gb';
import { IEC } from './iec';
import { IN } from './in';
import type { Practice } from './types';

/** The register of practices: another country is another file here, and its id in the document's schema. */
export const practices: Record<PracticeId, Practice> = { IEC, IN, GB };
