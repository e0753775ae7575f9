import { backupHome, smallHome } from '@/diagram/document/home';
import { twoSourcesUnmarked } from '@/diagram/rules/two-sources-unmarked';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

/** A mains outlet in the bedroom, beside what is backed up there. */
const mixed = () => backupHome().way('Q12', 'bedroom').socket('X12', 'Q12');

testRule(twoSourcesUnmarked, {
  valid: {
    'one source': smallHome(),
    'two sources with a notice': mixed().notice('bedroom', 'Two sources: isolate both.'),
    'a room with one of the two': backupHome(),
    'neutral and earth of the other source only': backupHome()
      .part('neutral-bar', 'NB9', 'bedroom')
      .cable('k9', 4, 9)
      .neutral('NB', 'NB9', 'k9'),
  },
  invalid: {
    'two sources in one room, no notice': { drawing: mixed(), findings: [{ severity: 'advice', message: /Bedroom/ }] },
  },
});

testRemedies(twoSourcesUnmarked, { 'write the notice': { drawing: mixed(), offers: ['Write the notice'] } });
