import { light } from '#src/styles/tokens.ts';
import { plotOption } from './plot-option.ts';
import type { PlotPicture } from './plot-types.ts';

const WIDTH = 900;
const HEIGHT = 540;

/** Hands a file to the browser. */
export function download(name: string, content: Blob): void {
  const address = URL.createObjectURL(content);
  const link = document.createElement('a');
  link.href = address;
  link.download = name;
  link.click();
  // The browser reads the address after the click has been handled.
  setTimeout(() => URL.revokeObjectURL(address), 10_000);
}

export function downloadCsv(name: string, text: string): void {
  // The mark tells spreadsheets that the units are UTF-8.
  download(`${name}.csv`, new Blob(['\ufeff', text], { type: 'text/csv;charset=utf-8' }));
}

/** A plane stays square on paper too; two plots above each other need the height. */
function sizeOf({ plane, panel }: PlotPicture): { width: number; height: number } {
  if (plane) return { width: 640, height: 640 };
  return { width: WIDTH, height: panel ? 1.3 * HEIGHT : HEIGHT };
}

/** The picture as it goes out: light, with its legend inside, without crosshair and marked band. */
function exported(picture: PlotPicture) {
  const shown = picture.series.filter(({ key }) => !picture.hidden.has(key));
  const margins = picture.plane
    ? { left: 78, right: 26, top: 44, bottom: 60 }
    : { left: 78, right: 24, top: 44, bottom: 58 };
  return {
    ...plotOption({ ...picture, cursor: null, band: null, faded: false }, light, margins),
    backgroundColor: light.sheet,
    legend: {
      data: shown.map(({ name }) => name),
      top: 8,
      right: 18,
      textStyle: { color: light.ink },
      itemWidth: 34,
      itemGap: 18,
    },
  };
}

async function svgText(picture: PlotPicture): Promise<string> {
  const [echarts] = await Promise.all([import('echarts/core'), import('./plot-canvas.tsx')]);
  const chart = echarts.init(null, null, { renderer: 'svg', ssr: true, ...sizeOf(picture) });
  chart.setOption(exported(picture));
  const text = chart.renderToSVGString();
  chart.dispose();
  return text;
}

export async function downloadSvg(name: string, picture: PlotPicture): Promise<void> {
  download(`${name}.svg`, new Blob([await svgText(picture)], { type: 'image/svg+xml' }));
}

/** The same picture in dots, twice as fine as a screen, for slides. */
export async function downloadPng(name: string, picture: PlotPicture): Promise<void> {
  const echarts = await import('echarts/core');
  await import('./plot-canvas.tsx');
  const chart = echarts.init(document.createElement('div'), null, {
    renderer: 'canvas',
    devicePixelRatio: 2,
    ...sizeOf(picture),
  });
  chart.setOption(exported(picture));
  const canvas = chart.getRenderedCanvas({ pixelRatio: 2, backgroundColor: light.sheet });
  const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
  chart.dispose();
  if (!blob) throw new Error('The browser gave no picture.');
  download(`${name}.png`, blob);
}
