// Draws the figures of the core: the same option gives the same picture in the
// command and on the page. Options are data; the functions they name are here.
import { CustomChart, LineChart, ScatterChart } from 'echarts/charts';
import { GridComponent, LegendPlainComponent } from 'echarts/components';
import { init, setPlatformAPI, use } from 'echarts/core';
import type { EChartsCoreOption } from 'echarts/core';
import { LabelLayout } from 'echarts/features';
import { SVGRenderer } from 'echarts/renderers';
import { marks, printer, type Marks } from './marks';
import { inElement, inMarkup } from './subscripts';
import { measureText } from './widths';

use([LineChart, ScatterChart, CustomChart, GridComponent, LegendPlainComponent, LabelLayout, SVGRenderer]);
setPlatformAPI({ measureText: measureText as (text: string, font?: string) => TextMetrics });

// Option is an option of the core, as its JSON was read.
export interface Option {
  xAxis: Axis[];
  yAxis: Axis[];
  series: Series[];
  [part: string]: unknown;
}

interface Axis {
  axisLabel?: { formatter?: unknown };
}

interface Series extends Marks {
  type: string;
  renderItem?: unknown;
}

// revived returns an option with functions in place of their names. A name
// that is not known is an error: a mark left out would be a silent gap.
function revived(option: Option): EChartsCoreOption {
  return {
    ...option,
    xAxis: option.xAxis.map(withPrinter),
    yAxis: option.yAxis.map(withPrinter),
    series: option.series.map(withMarks),
  };
}

function withPrinter(axis: Axis): Axis {
  const name = axis.axisLabel?.formatter;
  if (name === undefined) return axis;
  const formatter = printer(String(name));
  if (!formatter) throw new Error(`figure: no print function "${name}"`);
  return { ...axis, axisLabel: { ...axis.axisLabel, formatter } };
}

function withMarks(series: Series): Series {
  if (series.renderItem === undefined) return series;
  const name = String(series.renderItem);
  if (!Object.prototype.hasOwnProperty.call(marks, name)) throw new Error(`figure: no draw function "${name}"`);
  return { ...series, renderItem: marks[name](series) };
}

// still is asked of the renderer itself: its style rules for the pointer and for
// movement have names that count on from figure to figure, and only there they
// can be left out.
const still = { useViewBox: true, cssEmphasis: false, cssAnimation: false };

// draw returns a figure as one SVG element with real text. Every id in it
// begins with idPrefix, so that several may stand in one document.
export function draw(option: Option, width: number, height: number, idPrefix: string): string {
  const chart = init(null, null, { renderer: 'svg', ssr: true, width, height });
  try {
    chart.setOption(revived(option));
    const painter = chart.getZr().painter as unknown as { renderToString(options: typeof still): string };
    return prefixed(inMarkup(painter.renderToString(still)), idPrefix);
  } finally {
    chart.dispose();
  }
}

// prefixed replaces the counter of the renderer, which depends on how many
// figures were drawn before, and leaves out its notes to a script.
function prefixed(svg: string, idPrefix: string): string {
  return svg
    .replace(/ ecmeta_[a-z_]+="[^"]*"/g, '')
    .replace(/(\bid="|url\(#)zr\d+-/g, (_, before: string) => `${before}${idPrefix}-`);
}

// Mounted is a live figure.
export interface Mounted {
  update(option: Option): void;
  resize(): void;
  dispose(): void;
}

// mount draws a figure into an element and keeps it there.
export function mount(element: HTMLElement, option: Option): Mounted {
  const chart = init(element, null, { renderer: 'svg' });
  chart.on('rendered', () => inElement(element));
  chart.setOption(revived(option));
  return {
    update: (next) => chart.setOption(revived(next), { notMerge: true }),
    resize: () => chart.resize(),
    dispose: () => chart.dispose(),
  };
}
