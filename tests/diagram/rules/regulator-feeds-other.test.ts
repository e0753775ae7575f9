import { backupHome, smallHome } from '@/diagram/document/home';
import { regulatorFeedsOther } from '@/diagram/rules/regulator-feeds-other';
import { testRemedies } from '../remedy-tester';
import { testRule } from '../rule-tester';

testRule(regulatorFeedsOther, {
  valid: {
    'a regulator before its fan': smallHome().fan('M1', 'S2', 'R2', 'Q11'),
    'two fans on one regulator': smallHome()
      .fan('M1', 'S2', 'R2', 'Q11')
      .fan('M2', 'S3', 'R3', 'Q11')
      .cut('R3:2', 'M2:L')
      .drop('R3')
      .drop('S3')
      .switched('M1:L', 'M2:L', 'cM2'),
  },
  invalid: {
    'an outlet behind it': {
      drawing: smallHome().fan('M1', 'S2', 'R2', 'Q11').cut('JL11', 'X1:L').switched('R2:2', 'X1:L'),
      findings: [{ parts: ['R2', 'X1'], severity: 'danger', conditions: ['mains'] }],
    },
    'a lamp and an outlet behind it are one finding, in every condition': {
      drawing: backupHome()
        .fan('M2', 'S9', 'R9', 'Q21')
        .cut('JL21', 'X2:L')
        .switched('R9:2', 'X2:L')
        .cut('S2:2', 'E2:L')
        .drop('S2')
        .switched('R9:2', 'E2:L', 'cE2'),
      findings: [{ parts: ['R9', 'E2', 'X2'], conditions: ['mains', 'outage', 'main-off'] }],
    },
  },
});

testRemedies(regulatorFeedsOther, {
  'the outlet from before it': {
    drawing: smallHome().fan('M1', 'S2', 'R2', 'Q11').cut('JL11', 'X1:L').switched('R2:2', 'X1:L'),
    offers: ['Take it from before the regulator'],
  },
});
