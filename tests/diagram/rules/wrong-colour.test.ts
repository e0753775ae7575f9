import { smallHome } from '@/diagram/document/home';
import { wrongColour } from '@/diagram/rules/wrong-colour';
import { testRule } from '../rule-tester';

const coloured = (practice: 'IEC' | 'IN' | 'GB', line: string, neutral: string, earth: string) =>
  smallHome({ practice })
    .set('X1', practice === 'GB' ? { rating: 6 } : {})
    .cut('JL11', 'X1')
    .cut('JN11', 'X1')
    .cut('JE11', 'X1')
    .wire('line', 'JL11', 'X1:L', undefined, { colour: line })
    .wire('neutral', 'JN11', 'X1:N', undefined, { colour: neutral })
    .wire('earth', 'JE11', 'X1:E', undefined, { colour: earth });

testRule(wrongColour, {
  valid: {
    'no colour stated': smallHome(),
    'brown, blue, green-yellow': coloured('IEC', 'BN', 'BU', 'GNYE'),
    'red, black, green in India': coloured('IN', 'RD', 'BK', 'GN'),
    'brown, blue, green-yellow in India': coloured('IN', 'BN', 'BU', 'GNYE'),
    'red, black, green-yellow in an old home in Great Britain': coloured('GB', 'RD', 'BK', 'GNYE'),
    'small letters': coloured('IEC', 'bn', 'bu', 'gnye'),
  },
  invalid: {
    'a blue line': {
      drawing: coloured('IEC', 'BU', 'BU', 'GNYE'),
      findings: [{ parts: ['JL11', 'X1'], severity: 'defect' }],
    },
    'an earth that is blue': { drawing: coloured('IEC', 'BN', 'BU', 'BU'), findings: [{ severity: 'defect' }] },
    'a line in the colour of earth': {
      drawing: coloured('IEC', 'GNYE', 'BU', 'GNYE'),
      findings: [{ parts: ['JL11', 'X1'], severity: 'danger' }],
    },
    'a neutral in green in India': { drawing: coloured('IN', 'RD', 'GN', 'GN'), findings: [{ severity: 'danger' }] },
    'red and black where the practice has brown and blue': {
      drawing: coloured('IEC', 'RD', 'BU', 'GNYE'),
      findings: [{ severity: 'defect' }],
    },
  },
});
