/** What a chart is: traces and a layout for plotly, a table of its numbers, a sentence for who cannot see it. Pure data. */
import type { Data, Layout } from 'plotly.js-dist-min';

/** Numbers of a chart: one column for each quantity, heads with their unit. */
export interface ChartTable {
  readonly columns: readonly string[];
  readonly rows: readonly (readonly (number | string)[])[];
}

/** One chart. */
export interface ChartSpec {
  readonly title: string;
  /** In place of the title on the screen, where a choice beside it says the rest. */ readonly heading?: string;
  /** What it shows, in a sentence. */ readonly summary: string;
  readonly data: readonly Data[];
  readonly layout: Partial<Layout>;
  /** Made when asked for. */ readonly table: () => ChartTable;
}

/** Colours of a theme, read from the page. */
export interface Palette {
  readonly paper: string;
  readonly ink: string;
  readonly quiet: string;
  readonly rule: string;
  readonly bad: string;
  readonly badSoft: string;
  readonly shown: string;
  /** Of the run itself and of its branches. */ readonly lines: readonly string[];
}

/** The time axis that all charts share, and its width in the page. */
export interface TimeAxis {
  /** s from the start. */ readonly from: number;
  readonly to: number;
  /** Of the first upset; labels count from it. */ readonly upset: number;
  /** Space beside the plots, px. */ readonly left: number;
  readonly right: number;
}

/** Layout that all charts share. `marks`: times and their labels. */
export function baseLayout(
  axis: TimeAxis,
  palette: Palette,
  height: number,
  marks: readonly { at: number; text: string }[],
  showsTimes: boolean,
): Partial<Layout> {
  return {
    height,
    margin: { l: axis.left, r: axis.right, t: 4, b: showsTimes ? 22 : 6 },
    paper_bgcolor: 'rgba(0,0,0,0)',
    plot_bgcolor: 'rgba(0,0,0,0)',
    font: { family: "system-ui, 'Open Sans', sans-serif", size: 11, color: palette.quiet },
    showlegend: false,
    dragmode: false,
    hovermode: false,
    xaxis: {
      range: [axis.from, axis.to],
      tickvals: marks.map((m) => m.at),
      ticktext: marks.map((m) => m.text),
      showticklabels: showsTimes,
      gridcolor: palette.rule,
      zeroline: false,
      linecolor: palette.rule,
      fixedrange: true,
    },
    yaxis: {
      gridcolor: palette.rule,
      zeroline: false,
      linecolor: palette.rule,
      fixedrange: true,
      nticks: 4,
      automargin: false,
    },
  };
}

/** CSV of a table: RFC 4180. */
export function tableCsv({ columns, rows }: ChartTable): string {
  const field = (v: number | string): string => {
    const text = String(v);
    return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
  };
  return `${[columns, ...rows].map((row) => row.map(field).join(',')).join('\r\n')}\r\n`;
}
