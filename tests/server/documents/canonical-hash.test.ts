import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalHash, canonicalJson } from '#server/documents/canonical-hash.ts';

/** RFC 8785, appendix B: bits of the double, and its one canonical text. */
const APPENDIX_B: [bits: string, text: string][] = [
  ['0000000000000000', '0'],
  ['8000000000000000', '0'],
  ['0000000000000001', '5e-324'],
  ['8000000000000001', '-5e-324'],
  ['7fefffffffffffff', '1.7976931348623157e+308'],
  ['ffefffffffffffff', '-1.7976931348623157e+308'],
  ['4340000000000000', '9007199254740992'],
  ['c340000000000000', '-9007199254740992'],
  ['4430000000000000', '295147905179352830000'],
  ['44b52d02c7e14af5', '9.999999999999997e+22'],
  ['44b52d02c7e14af6', '1e+23'],
  ['44b52d02c7e14af7', '1.0000000000000001e+23'],
  ['444b1ae4d6e2ef4e', '999999999999999700000'],
  ['444b1ae4d6e2ef4f', '999999999999999900000'],
  ['444b1ae4d6e2ef50', '1e+21'],
  ['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'],
  ['3eb0c6f7a0b5ed8d', '0.000001'],
  ['41b3de4355555553', '333333333.3333332'],
  ['41b3de4355555554', '333333333.33333325'],
  ['41b3de4355555555', '333333333.3333333'],
  ['41b3de4355555556', '333333333.3333334'],
  ['41b3de4355555557', '333333333.33333343'],
  ['becbf647612f3696', '-0.0000033333333333333333'],
  ['43143ff3c1cb0959', '1424953923781206.2'],
];
const fromBits = (bits: string): number => Buffer.from(bits, 'hex').readDoubleBE();

function reversed(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(reversed);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(
    Object.entries(value)
      .reverse()
      .map(([key, item]) => [key, reversed(item)]),
  );
}

describe('canonical JSON (RFC 8785)', () => {
  it.each(APPENDIX_B)('writes the double %s as %s (appendix B)', (bits, text) => {
    expect(canonicalJson(fromBits(bits))).toBe(text);
  });

  it('refuses NaN and infinity (appendix B)', () => {
    for (const bits of ['7fffffffffffffff', '7ff0000000000000', 'fff0000000000000']) {
      expect(() => canonicalJson({ a: [fromBits(bits)] })).toThrow();
    }
  });

  it('gives the sample of section 3.2.2', () => {
    const sample: unknown = JSON.parse(String.raw`{
      "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
      "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
      "literals": [null, true, false]
    }`);
    expect(canonicalJson(sample)).toBe(
      String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`,
    );
  });

  it('orders names by UTF-16 code units (section 3.2.3)', () => {
    const sample = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    expect([...canonicalJson(sample).matchAll(/:"([^"]+)"/g)].map((match) => match[1])).toEqual([
      'Carriage Return',
      'One',
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ]);
  });

  it('does not depend on the order of members, for any JSON value', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect(canonicalJson(reversed(value))).toBe(canonicalJson(value));
        expect(canonicalJson(JSON.parse(canonicalJson(value)))).toBe(canonicalJson(value));
      }),
    );
  });
});

describe('canonicalHash', () => {
  const content = {
    document: { format: 1, energy: { value: 100, unit: 'eV' } },
    result: { estimate: { total: 0.816789 } },
    engine: { name: 'tallybarn', version: '0.1.0' },
  };

  it('is SHA-256 over the canonical text, here written out by hand', () => {
    const text =
      '{"document":{"energy":{"unit":"eV","value":100},"format":1},"engine":{"name":"tallybarn","version":"0.1.0"},"result":{"estimate":{"total":0.816789}}}';
    expect(canonicalHash(content)).toBe(createHash('sha256').update(text, 'utf8').digest('hex'));
    // The same with another program: printf %s '…' | sha256sum
    expect(canonicalHash(content)).toBe(
      '992f942dabac2d11786375a350facb83ce91360e89736b18ae9f41a6910c247f',
    );
  });

  it('covers document, result and engine, and nothing else', () => {
    const withMore = { ...content, title: 'not covered' };
    expect(canonicalHash(withMore)).toBe(canonicalHash(content));
    const others = [
      { ...content, document: { ...content.document, format: 2 } },
      { ...content, result: { estimate: { total: 0.8167890000000001 } } },
      { ...content, engine: { ...content.engine, version: '0.1.1' } },
    ];
    expect(new Set([content, ...others].map(canonicalHash)).size).toBe(4);
  });
});
