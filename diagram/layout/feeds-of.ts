import { traceFeeds } from '../terminals/feeds';
import { perDocument } from './per-document';

/** Which supply stands behind each part and wire, once for all that is drawn of a document. */
export const feedsOf = perDocument(traceFeeds);
