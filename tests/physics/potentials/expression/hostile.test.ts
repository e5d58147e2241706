import { describe, expect, it } from 'vitest';
import { PARAMETERS, Q, refusal } from './formulas.ts';

const deep = (levels: number) => `${'('.repeat(levels)}r${')'.repeat(levels)}`;

/** What a formula must not do, and the words it is refused with. */
const HOSTILE: [string, RegExp][] = [
  ['while (true) {}', /makes lists, objects or several statements/],
  ['for(;;) r', /several statements/],
  ['while(1)', /while is no function/],
  ['constructor', /^Character 1: constructor is neither r nor a parameter/],
  ['r.constructor', /^Character 2: a full stop stands in numbers only/],
  ['V0.constructor("return process")()', /^Character 3/],
  ['import("fs")', /no texts/],
  ['import(1)', /import is no function/],
  ['evaluate(1)', /evaluate is no function/],
  ['parse(r)', /parse is no function/],
  ['f(x) = x', /^Character 6: nothing is assigned/],
  ['V0 = 3', /nothing is assigned/],
  ['r == R', /nothing is assigned/],
  ['[1:1e9]', /makes lists/],
  ['{a: 1}', /makes lists, objects/],
  ['r; V0', /several statements/],
  ['"V0"', /no texts/],
  ['V0\u0027', /no texts/],
  ['`${V0}`', /no texts/],
  ['zeros(1e9)', /zeros is no function/],
  ['5!', /nothing is assigned/],
  ['V0 % 2', /“%” has no place/],
  ['r to cm', /^Character 3: to is neither/],
  ['2 cm', /write \* between 2 and cm|cm is neither/],
  ['globalThis', /globalThis is neither/],
  ['__proto__', /__proto__ is neither/],
  ['process', /process is neither/],
  ['this', /this is neither/],
  ['V0\\u0028r)', /“\\” has no place/],
  ['𝒱', /has no place/],
  [Array(600).fill('2').join('^'), /nested more than 50 deep/],
  ['-'.repeat(1900) + 'r', /nested more than 50 deep/],
  [deep(999), /^Character 51: parentheses may lie at most 50 deep/],
  ['('.repeat(1999), /at most 50 deep/],
  [deep(2000), /at most 2000 characters/],
  ['r<R?V0:'.repeat(200) + 'V0', /nested more than 50 deep/],
  ['exp('.repeat(60) + 'r' + ')'.repeat(60), /at most 50 deep/],
  ['1e999', /too large for double precision/],
  ['V0'.repeat(1001), /at most 2000 characters/],
  ['', /empty/],
  ['   ', /empty/],
  ['V0*', /ends too soon/],
  ['*V0', /cannot be read here/],
  ['(V0', /is not closed/],
  ['V0)', /never opened/],
  ['V0 r', /write \* between V0 and r/],
  ['V0(r)', /V0 is no function/],
  ['exp', /exp is a function/],
  ['exp(r/a, 2)*V0', /takes 1 argument; it has 2/],
  ['sqrt()*V0', /takes 1 argument; it has 0/],
  ['min(r)', /takes 2 to 20 arguments/],
  ['r < a < R', /two values at a time/],
  ['r**2', /write \^ for powers/],
  ['V0*sin(far/r)*exp(-r/a)', /cannot be followed/],
  ['V0*sin(exp(exp(r/a)))*exp(-r/a)', /cannot be followed|no finite value/],
];

describe('hostile formulas are refused in words', () => {
  it.each(HOSTILE.map(([text, words]) => [text.slice(0, 40), text, words] as const))(
    '%s',
    (_, text, words) => {
      const { path, message } = refusal(text);
      expect(path).toBe('/formula');
      expect(message).toMatch(words);
    },
  );

  it('a formula of very many parts, comparisons and lengths answers or is refused', () => {
    const many = Object.fromEntries(
      Array.from({ length: 40 }, (_, i) => [`x${i}`, Q(1 + i / 7, 'angstrom')]),
    );
    const names = Object.keys(many);
    const texts = [
      `V0*exp(-r/a)*(${names.map((name) => `abs(1-r/${name})`).join('+')})`,
      `V0*max(${names
        .slice(0, 20)
        .map((name) => `exp(-r/${name})`)
        .join(',')})*exp(-r/a)`,
      `V0*exp(-r/a)*(${Array.from({ length: 270 }, () => 'r/a').join('-')})`,
    ];
    for (const text of texts) {
      try {
        refusal(text, { ...PARAMETERS, ...many });
      } catch (error) {
        // Taken: that is as good an answer.
        expect(String(error)).toMatch(/was taken/);
      }
    }
  });

  it('parameters: names with a meaning of their own, strange units, numbers without end', () => {
    const named = (name: string, value: (typeof PARAMETERS)[string]) =>
      refusal('V0*exp(-r/a)', { ...PARAMETERS, [name]: value });
    expect(named('exp', 1)).toMatchObject({ path: '/parameters/exp' });
    expect(named('r', Q(1, 'angstrom')).message).toMatch(/meaning of its own/);
    expect(named('mod', 1).message).toMatch(/reserved/);
    expect(named('a-b', 1).message).toMatch(/is no name/);
    expect(named('t', Q(1, 's')).message).toMatch(/made of energies and lengths/);
    expect(named('t', Q(1, 'furlong')).message).toMatch(/not a unit.*energies and lengths/);
    expect(named('t', Q(Infinity, 'eV')).message).toMatch(/at most/);
  });
});

describe('units', () => {
  const CASES: [string, RegExp][] = [
    ['r', /gives a length; V\(r\) is an energy/],
    ['exp(-r/a)', /gives a plain number.*Multiply it by one/],
    ['V0 + r', /^Character 6: “V0” is an energy and “r” is a length: they cannot be added/],
    ['V0*exp(-r)', /^Character 9: exp takes a plain number; “r” is a length. Divide by a length/],
    ['V0*r^n', /its exponent must be a number written in the formula/],
    ['V0*2^r', /an exponent is a plain number; “r” is a length/],
    ['min(V0, r)', /cannot be compared/],
    ['r < V0 ? V0 : 0', /cannot be compared/],
    ['r < R ? V0 : r', /cannot be alternatives/],
    ['r ? V0 : 0', /must compare/],
    ['V0*(r < R)', /is true or false, no value/],
    ['V0*r^2/a', /an energy times a length/],
    ['sqrt(V0)*exp(-r/a)', /energy\^0\.5/],
  ];
  it.each(CASES)('%s', (text, words) => {
    expect(refusal(text).message).toMatch(words);
  });
});

describe('what V(r) must be', () => {
  const CASES: [string, RegExp][] = [
    ['V0', /does not vanish at large distances/],
    ['V0*r/a', /does not vanish/],
    ['V0*exp(r/a)', /no finite value at r = \d+ angstrom/],
    ['V0*log(-r/a)', /no finite value/],
    ['V0*sqrt(1 - r/a)', /no finite value at r = 1 angstrom/],
    ['V0*(a/r)^3*exp(-r/a)', /rises as r\^-3 at the origin/],
    ['V0*((a/r)^12 - 2*(a/r)^6)', /rises as r\^-12/],
    ['V0/(1 + (r/a)^2)', /falls off as r\^-2 only/],
    ['V0/(1 + (r/a)^2)^(3/2)', /falls off as r\^-3 only/],
    ['k/(r + d)', /what 1\/r leaves of it does not die away/],
    ['k/sqrt(r^2 + d^2)', /what 1\/r leaves of it does not die away/],
  ];
  it.each(CASES)('%s', (text, words) => {
    expect(refusal(text).message).toMatch(words);
  });
});
