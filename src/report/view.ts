import type {Severity} from '../occupation/result.ts';
import {epochsUsedOf} from '../wording/findings.ts';
import {fixed, formatDuration, formatUtc} from '../wording/numbers.ts';
import {spanBesideUtc} from '../wording/time-zone.ts';
import {type ReportContext, referenceName} from './context.ts';
import {causesFigure} from './figures/causes-figure.ts';
import type {FigureOrReason} from './figures/figure.ts';
import {planFigure} from './figures/plan-figure.ts';
import {scatterFigure} from './figures/scatter-figure.ts';
import {correlationFigure, settlingFigure} from './figures/settling-figures.ts';
import {signalFigure, skyFigure} from './figures/sky-figures.ts';
import {timeFigure} from './figures/time-figure.ts';
import type {Renderer} from './render.ts';
import {cssString, fileStem, jsonForHtml, jsonUrl} from './text/embed.ts';
import {largeUnit} from './units.ts';
import {allanDeviationTable} from './view/allan.ts';
import {accidentalNote, causesTable} from './view/causes.ts';
import {checks} from './view/checks.ts';
import {type DrawnFigure, figurePainter} from './view/drawn-figure.ts';
import {frameChangeTable} from './view/frame-change.ts';
import {intervalMeaning} from './view/interval.ts';
import {otherSetupsTable} from './view/other-setups.ts';
import {coordinateTable, offsetTable, positionNotes, segmentTable} from './view/position.ts';
import {
  budgetTable,
  inputViews,
  lineTable,
  scatterTable,
  screeningTable,
  settingsTable,
  stepsTable,
} from './view/tables.ts';
import {headlineNumber, verdictView} from './view/verdict.ts';

/** The exact strings and pictures that the template shows. */
export async function pageView(context: ReportContext, renderer: Renderer, css: string) {
  const {result, options} = context;
  const heading = options.title ?? headingOf(context);
  const checked = checks(context);
  const figures = await drawnFigures(context, renderer);
  const json = jsonForHtml(result);
  const causes = causesTable(context);
  const heads = sectionHeads(causes !== null);
  const footer = `${heading}, ${dateOf(context)}`;
  return {
    title: `${heading}: ${headlineNumber(context)}`,
    css: `${squeezed(css)}@page{@bottom-left{content:${cssString(footer)}}}`,
    kicker: kickerOf(context),
    heading,
    logo: options.logoDataUrl,
    preparedFor: options.preparedFor,
    remarks: options.remarks,
    facts: headerFacts(context),
    verdict: verdictView(context, checked),
    heads,
    contents: Object.values(heads).filter((head) => head !== null),
    figures,
    offsets: offsetTable(context),
    coordinates: coordinateTable(context),
    segments: segmentTable(context),
    positionNotes: positionNotes(context),
    checks: checked,
    notices: noticeViews(context),
    otherSetups: otherSetupsTable(context),
    causes,
    accidental: accidentalNote(context),
    scatter: scatterTable(context),
    steps: stepsTable(context),
    budget: budgetTable(context),
    frameChange: frameChangeTable(context),
    allan: allanDeviationTable(context),
    intervalMeaning: intervalMeaning(context),
    screening: screeningTable(context),
    lines: lineTable(context),
    inputs: inputViews(context),
    settings: settingsTable(context),
    sheet: sheetSections(context),
    feet: options.units === 'm' ? null : feetNote(context),
    program: `${result.program.name} ${result.program.version}`,
    json,
    jsonUrl: jsonUrl(result),
    jsonName: `${fileStem(heading)}-result.json`,
  };
}

/** What kind of report it is, and of which mark where the heading does not say so. */
function kickerOf({result, options}: ReportContext): string {
  const kind =
    result.command === 'check' ? 'Check on a known mark' : 'Position from a static occupation';
  const {mark} = result.occupation;
  return options.title === null || mark === null ? kind : `${kind}: ${mark}`;
}

function headingOf({result}: ReportContext): string {
  const {mark} = result.occupation;
  return mark === null ? 'Unnamed point' : mark;
}

function dateOf({result}: ReportContext): string {
  return result.epochs.firstUtc?.slice(0, 10) ?? 'no date';
}

interface Fact {
  readonly label: string;
  readonly value: string;
}

function headerFacts(context: ReportContext): Fact[] {
  const {result, options} = context;
  const {epochs, occupation, reference, screening} = result;
  const interval =
    epochs.intervalS === null ? '' : `, one every ${formatDuration(epochs.intervalS)}`;
  const fix = screening.fixClassKept === null ? '' : `, ${screening.fixClassKept}`;
  const unit = largeUnit(options.units);
  return [
    {label: 'Occupied', value: spanText(epochs.firstUtc, epochs.lastUtc, options.timeZone)},
    {label: 'Epochs used', value: `${epochsUsedOf(epochs.used, epochs.read)}${interval}${fix}`},
    {
      label: 'Offsets from',
      value: reference === null ? 'no reference' : (reference.name ?? referenceWords(context)),
    },
    {
      label: 'Antenna height',
      value:
        occupation.antennaHeightM === null
          ? 'not given'
          : `${fixed(occupation.antennaHeightM * unit.perM, 4)}\u00a0${unit.name}${occupation.heightUsed === null ? '' : `, ${occupation.heightUsed}`}`,
    },
  ];
}

function referenceWords(context: ReportContext): string {
  return {mark: 'the mark', reference: 'the place given', mean: 'their mean'}[
    referenceName(context)
  ];
}

function spanText(from: string | null, to: string | null, zone: string | null): string {
  if (from === null || to === null) return 'no time in the log';
  const sameDay = from.slice(0, 10) === to.slice(0, 10);
  const end = sameDay ? formatUtc(to).slice(11) : formatUtc(to);
  return `${formatUtc(from)} to ${end} UTC${spanBesideUtc(from, to, zone)}`;
}

interface SectionHead {
  readonly id: string;
  readonly number: string;
  readonly title: string;
}

/** Line breaks stay; indentation and comments go. */
function squeezed(css: string): string {
  return css
    .replace(/\/\*.*?\*\//gs, '')
    .replace(/\n\s+/g, '\n')
    .trim();
}

/** Numbered, so that a reviewer can point at them. */
function sectionHeads(hasCauses: boolean) {
  let count = 0;
  const next = (id: string, title: string): SectionHead => ({id, number: String(++count), title});
  return {
    position: next('position', 'Position'),
    checks: next('checks', 'Checks'),
    causes: hasCauses ? next('causes', 'Suspected causes') : null,
    time: next('over-time', 'Over time'),
    scatter: next('scatter', 'Scatter'),
    settling: next('settling', 'How the mean settled'),
    signal: next('signal', 'Correlation, sky and signal'),
    budget: next('budget', 'Uncertainty budget'),
    screening: next('screening', 'Screening'),
    provenance: next('provenance', 'Inputs and provenance'),
    notes: next('field-notes', 'Field notes'),
    methods: next('methods', 'Methods and limits'),
  };
}

async function drawnFigures(context: ReportContext, renderer: Renderer) {
  const paint = figurePainter(renderer);
  const drafts: Record<string, FigureOrReason | null> = {
    plan: planFigure(context),
    causes: causesFigure(context),
    time: timeFigure(context),
    scatter: scatterFigure(context),
    settling: settlingFigure(context),
    correlation: correlationFigure(context),
    sky: skyFigure(context),
    signal: signalFigure(context),
  };
  const drawn: Record<string, DrawnFigure | null> = {};
  // One after the other: Vega counts ids per process.
  for (const [name, draft] of Object.entries(drafts)) {
    drawn[name] = draft === null ? null : await paint(draft);
  }
  return drawn;
}

const SEVERITY: Readonly<Record<Severity, {shape: string; toneClass: string; word: string}>> = {
  concern: {shape: '■', toneClass: 'outside', word: 'Concern'},
  caution: {shape: '▲', toneClass: 'look', word: 'Caution'},
  note: {shape: '○', toneClass: 'not-tested', word: 'Note'},
  absent: {shape: '○', toneClass: 'not-tested', word: 'Not known'},
};

function noticeViews({result}: ReportContext) {
  const order: Record<Severity, number> = {concern: 0, caution: 1, note: 2, absent: 3};
  // Explanations of absent values serve readers of the JSON; the page says why where it matters.
  return result.notices
    .filter(({severity}) => severity !== 'absent')
    .sort((a, b) => order[a.severity] - order[b.severity])
    .map(({severity, text}) => ({...SEVERITY[severity], text}));
}

interface SheetSection {
  readonly title: string;
  readonly given: {readonly label: string; readonly value: string}[];
  /** Items that nobody gave: each keeps a line to be filled in by hand. */
  readonly open: string[];
}

/** The record of the mark and the field sheet, section by section, in their order. */
function sheetSections({result}: ReportContext): SheetSection[] {
  const sections: SheetSection[] = [];
  for (const {section, item, value} of [...result.markRecord, ...result.fieldSheet]) {
    let last = sections[sections.length - 1];
    if (last?.title !== section) {
      last = {title: section, given: [], open: []};
      sections.push(last);
    }
    if (value === null) last.open.push(item);
    else last.given.push({label: item, value});
  }
  return sections;
}

function feetNote({options}: ReportContext): string {
  return options.units === 'ft'
    ? 'Lengths are in international feet of exactly 0.3048 m.'
    : 'Lengths are in US survey feet of exactly 1200/3937 m.';
}
