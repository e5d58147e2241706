import { describe, expect, test } from 'vitest';
import { formatNumber } from '#shared/units/format.ts';
import { CAUTION } from '#server/reports/cautions.ts';
import { drawReport } from '#server/reports/draw-report.ts';
import { REPORT_KINDS } from '#server/reports/report-input.ts';
import type { ReportKind } from '#server/reports/report-input.ts';
import type { CaseDocument, VersionDetail } from '#shared/contracts/cases.ts';
import { expectRelative } from '#tests/support/expect-relative.ts';
import { yukawaDocument } from '../documents/sample-documents.ts';
import { readPdf } from '#tests/support/read-pdf.ts';
import { coulombDocument, hardSphereDocument, runPlanOf, savedVersion } from './saved-versions.ts';

const paper = (version: VersionDetail, kind: ReportKind) =>
  readPdf(drawReport({ kind, caseNumber: 41, version }));
const six = (value: number) => formatNumber(value, 6);

const bothMethods: CaseDocument = { ...yukawaDocument, methods: ['born1', 'partialWaves'] };
const plain = savedVersion(bothMethods);
const planned = savedVersion({ ...yukawaDocument, runPlan: runPlanOf(3) });

describe.each(REPORT_KINDS)('the %s report', (kind) => {
  test('says what it is a report of, on paper and in the file', async () => {
    const { flow, info, fonts } = await paper(plain, kind);
    expect(flow).toContain('Case 41, version 3 (draft) · Experimentalist of the hall');
    expect(flow).toContain('saved 2026-01-02 03:04 UTC');
    expect(flow).toContain(plain.hash);
    expect(flow).toContain(`tallybarn ${plain.engine.version}`);
    expect(flow).toContain('How much is scattered past 20 degrees?');
    expect(info['Title']).toBe('Yukawa well');
    expect(info['Author']).toBe('Experimentalist of the hall');
    expect(info['Subject']).toContain('Case 41, version 3');
    expect(info['CreationDate']).toContain('2026-01-02T03:04:05');
    expect(fonts.length).toBeGreaterThan(0);
    for (const font of fonts) expect(font).toMatch(/SourceSans3.* yes yes yes /);
  });

  test('holds the stored cross sections, the verdict with its basis, and what limits it', async () => {
    const { estimate } = plain.result;
    const { flow } = await paper(plain, kind);
    for (const method of ['born1', 'partialWaves'] as const) {
      const result = estimate.methods[method];
      if (!result || 'unavailable' in result || 'divergent' in result.elastic) throw new Error();
      expect(flow).toContain(`${six(result.elastic.value)} Å²`);
    }
    expect(estimate.validity).toMatchObject({ verdict: 'sound', basis: 'exact' });
    expect(flow).toContain('First Born here: sound');
    expect(flow).toContain('By the exact calculation: the deviation of the elastic total is');
    expect(flow).toContain('sound below 2.00 %, usable below 20.0 %');
    expect(flow).toContain('dσ/dΩ (Å²/sr)');
    expect(flow).toContain('scattering angle θ (°)');
    expect(flow).toContain('exact (phase shifts)');
  });

  test('shows the rates of a plan as they were stored, and the cautions', async () => {
    const { runPlan } = planned.result;
    if (!runPlan) throw new Error('The sample has a plan.');
    const { flow } = await paper(planned, kind);
    for (const one of runPlan.detectors) {
      const numbers = [one.trueRate.value, one.observedRate.value].map(six).join(' ');
      expect(flow).toContain(numbers);
      expect(flow).toContain(one.name);
    }
    expect(flow).toContain(runPlan.decidedBy.message);
    expect(flow).toContain(CAUTION);
    expect(flow).toContain('Where does the beam stop');
    expect(flow).toContain('How is the vacuum broken without losing the foil');
  });

  test('a total that diverges is said to diverge', async () => {
    const version = savedVersion(coulombDocument);
    const { born1 } = version.result.estimate.methods;
    if (!born1 || 'unavailable' in born1 || !('divergent' in born1.elastic)) throw new Error();
    const { flow } = await paper(version, kind);
    expect(flow).toContain('divergent');
    // In a column of a table the rest stands on further lines, between those of other cells.
    const words = born1.elastic.reason.split(' ').slice(0, 6).join(' ');
    expect(flow).toContain(words);
    expect(flow).toContain('scattering angle θ (°), lab');
    expect(flow).toContain('become active');
  });

  test('without first order the reason stands in place of its numbers', async () => {
    const version = savedVersion(hardSphereDocument);
    const { born1 } = version.result.estimate.methods;
    if (!born1 || !('unavailable' in born1)) throw new Error('A hard sphere has no first order.');
    const { flow } = await paper(version, kind);
    expect(flow).toContain(`First Born is not available: ${born1.reason}`);
    expect(flow).toContain('First Born here: not assessed');
  });

  test.each([
    ['one word of 200 letters', 'W'.repeat(200)],
    ['right to left, with controls of direction', '\u202Eשלום \u2067עולם\u2069 ومرحبا'],
    ['signs that no typeface holds', '😀👩‍🔬🏳️‍🌈 \uE0FF e\u0301 ﷽'],
    ['PDF syntax', ') Tj ET (\\ %% endobj << /Title (x) >>'],
  ])('a hostile title is drawn and kept: %s', async (_, title) => {
    const name = `${title} ${'\u0301'.repeat(30)}`.slice(0, 200);
    const version = savedVersion(yukawaDocument, { title: name, note: `${title}\n\n`.repeat(9) });
    const { info, flow } = await paper(version, kind);
    expect(info['Title']?.normalize('NFC').trim()).toContain(
      title.slice(0, 20).normalize('NFC').trim(),
    );
    expect(flow).toContain('page 1 of ');
    expect(flow).toContain('First Born here');
    const lacking = /[\u0590-\u07ff]|\p{Extended_Pictographic}/u.test(title);
    expect(flow.includes('□ stands for a sign')).toBe(lacking);
  });

  test('one version always gives one file', () => {
    const again = () => drawReport({ kind, caseNumber: 41, version: planned });
    expect(Buffer.compare(again(), again())).toBe(0);
  });
});

describe('the proposal page', () => {
  test('stays one page, whatever the case holds, and counts what it leaves out', async () => {
    const runPlan = runPlanOf(60);
    const note = 'A long question, with reasons. '.repeat(60);
    const version = savedVersion({ ...bothMethods, runPlan }, { title: 'Long '.repeat(40), note });
    const { flow, info } = await paper(version, 'proposal');
    expect(info['Pages']).toBe('1');
    expect(flow).toContain('page 1 of 1');
    expect(flow).toMatch(/\d+ more of 60 detectors stand in the full report/);
    expect(flow).toContain(CAUTION);
  });
});

describe('the full report', () => {
  test('has an outline, numbered pages, and heads on every page of a long table', async () => {
    const version = savedVersion({ ...yukawaDocument, runPlan: runPlanOf(60) });
    const { text, info } = await paper(version, 'full');
    const pages = text.split('\f').slice(0, -1);
    expect(pages.length).toBe(Number(info['Pages']));
    pages.forEach((page, index) => {
      expect(page).toContain(`page ${index + 1} of ${pages.length}`);
    });
    const rows = pages.filter((page) => /Counter \d+ +thickness/.test(page));
    expect(rows.length).toBeGreaterThan(2);
    for (const page of rows) expect(page).toMatch(/Detector +Input +std\. uncertainty/);
    const bytes = Buffer.from(drawReport({ kind: 'full', caseNumber: 41, version }));
    const entries = [...bytes.toString('latin1').matchAll(/\/Title \(([^)]*)\)/g)];
    const titles = entries.map(([, title]) => title);
    expect(titles).toEqual(
      expect.arrayContaining([
        'Summary',
        'Validity',
        'Run plan',
        'Warnings',
        'Cautions',
        'Numbers',
      ]),
    );
  });

  test('prints every warning as it was shown', async () => {
    const { flow } = await paper(planned, 'full');
    const { estimate, runPlan } = planned.result;
    const warnings = [...estimate.warnings, ...(runPlan?.warnings ?? [])];
    expect(warnings.length).toBeGreaterThan(0);
    for (const { message } of warnings) expect(flow).toContain(message.replace(/\s+/g, ' '));
  });

  test('the golden rule ends in the cross section, each step with its unit', async () => {
    const { goldenRule } = plain.result.estimate;
    if ('unavailable' in goldenRule) throw new Error('A Yukawa well has a first order.');
    const { matrixElementTimesVolume: element, dcs } = goldenRule;
    const { flow } = await paper(plain, 'full');
    expect(flow).toContain(`matrix element times volume ${six(element.re)} eV Å³`);
    expect(flow).toContain(`dσ/dΩ = rate / flux ${six(dcs.value)} Å²/sr`);
  });

  test('the factors of a detector multiply to the product beside them', async () => {
    const { flow } = await paper(planned, 'full');
    const [first] = planned.result.runPlan?.detectors ?? [];
    if (!first?.product) throw new Error('The sample has a product.');
    const [beam, areal, ...own] = first.factors.map(({ value }) => value);
    expect(flow).toContain(
      `beam rate ${six(beam ?? 0)} s⁻¹, areal density ${six(areal ?? 0)} cm⁻²`,
    );
    expect(flow).toContain([...own, first.product.value].map(six).join(' '));
    const product = first.factors.reduce((whole, { value }) => whole * value, 1);
    // The areal density is per cm², the cross section in Å².
    expectRelative(product * 1e-16, first.product.value, 1e-12);
  });
});
