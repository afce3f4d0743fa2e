// Written by go run ./web/build/types from the types of core/message: change those.

export interface Request {
  protocol: number;
  number: number;
  kind: string;
  names?: string[];
  at?: string;
  target?: Target;
  value?: string;
  why?: string;
  cell?: string;
  theme?: string;
  grids?: GridsRequest;
  compare?: CompareRequest;
  drawings?: Record<string, string>;
}

export interface Reply {
  protocol: number;
  number: number;
  status: number;
  error?: Notice;
  about?: About;
  read?: ReadReply;
  grids?: GridsCase[];
  compare?: CompareReply;
  results?: Results;
  view?: View;
  walk?: WalkReply;
  files?: string[];
}

export interface Target {
  kind: string;
  id: string;
  field: string;
}

export interface GridsRequest {
  size?: string;
  value?: string;
  dim?: number;
  limits: boolean;
  rule?: string;
  formal?: number;
}

export interface CompareRequest {
  sim_table?: string;
  ref_table?: string;
  x: string;
  y: string;
  ref_x?: string;
  ref_y?: string;
  u?: string;
  u_k?: string;
  u_common?: string;
  u_num?: string;
  u_input?: string;
  u_interp: boolean;
  interp?: string;
  k?: number;
}

export interface Notice {
  code: string;
  severity: Severity;
  text: string;
  file?: string;
  line: number;
  column?: number;
}

export interface About {
  product: string;
  version: string;
  edition: string;
}

export interface ReadReply {
  file: string;
  sha256: string;
  stated?: Stated[];
  cards?: string[];
  tables: ReadTable[] | null;
  notices: Finding[] | null;
}

export interface GridsCase {
  table: string;
  value: string;
  class: string;
  order: number | null;
  extrapolated: number | null;
  ea: number | null;
  eext: number | null;
  gci: number | null;
  u: number | null;
  rule: string;
  notices: Finding[] | null;
}

export interface CompareReply {
  stations: CompareStation[] | null;
  outside: (number | null)[] | null;
  summary: CompareSummary;
  joint: CompareJoint | null;
  crossings: CompareCrossings;
  notices: Finding[] | null;
}

export interface Results {
  report: Report;
  statements: CellStatement[] | null;
  figures: CellFigure[] | null;
}

export interface View {
  title: string;
  purpose: string;
  status: string;
  unsaved: boolean;
  undo: string;
  redo: string;
  selected: string;
  statement: Statement;
  spoken: string;
  next: NextPoint | null;
  open_count: number;
  board: Board;
  courses: Course[] | null;
  names: Names;
  clashes: string[] | null;
  slips: SlipCard[] | null;
  sources: SourceCard[] | null;
  excluded: ExcludedCard[] | null;
  lists: EntryList[] | null;
  people: Entry[] | null;
  files: FileCard[] | null;
  log: StudyEntry[] | null;
  notices: string[] | null;
  veiled: boolean;
  reveal: Target;
}

export interface WalkReply {
  step: Step;
  shown: string;
  said: string[] | null;
  ways: WalkInput[] | null;
}

export type Severity = string;

export interface Stated {
  key: string;
  value: string;
  table?: string;
  line: number;
}

export interface ReadTable {
  name: string;
  rows: number;
  columns: ReadColumn[] | null;
}

export interface Finding {
  code: string;
  severity: Severity;
  text: string;
  line: number;
}

export interface CompareStation {
  x: number | null;
  s: number | null;
  d: number | null;
  e: number | null;
  u_d: number | null;
  u_num: number | null;
  u_input: number | null;
  u_val: number | null;
  ratio: number | null;
}

export interface CompareSummary {
  n: number;
  bias: number | null;
  mae: number | null;
  rmse: number | null;
  max_abs: number | null;
  within_u_val: number;
  within_k_u_val: number;
}

export interface CompareJoint {
  statistic: number | null;
  n: number;
  p_value: number | null;
}

export interface CompareCrossings {
  sim: (number | null)[] | null;
  ref: (number | null)[] | null;
}

export interface Report {
  title: string;
  code?: CodeEvidence;
  code_checks?: CodeCheck[];
  purpose: string;
  edition: string;
  files: FileLine[] | null;
  cells: Cell[] | null;
  differences: Difference[] | null;
  notices: Notice[] | null;
  prepared: Signature;
  checked: Signature;
  approved: Signature;
  log: StudyEntry[] | null;
}

export interface CellStatement {
  cell: string;
  case: string;
  quantity: string;
  model: string;
  text: string;
  sentence: Statement;
}

export interface CellFigure {
  case: string;
  quantity: string;
  model: string;
  figure: Figure;
}

export interface Statement {
  status: string;
  phrases: Phrase[] | null;
}

export interface NextPoint {
  cell: string;
  open: Open;
}

export interface Board {
  models: string[] | null;
  rows: BoardRow[] | null;
  summary: string;
}

export interface Course {
  question: string;
  answer: string;
  state: State;
  numbers: Headline[] | null;
  doubts: Open[] | null;
  notes: string[] | null;
  figures: CellFigure[] | null;
  tables: Table[] | null;
}

export interface Names {
  pattern: Entry;
  table: Table | null;
  notices: string[] | null;
}

export interface SlipCard {
  id: string;
  file: string;
  name: string;
  read: string;
  entries: Entry[] | null;
  open: number;
  group: string;
  odd: string;
  notices: string[] | null;
  sketch: Sketch;
}

export interface SourceCard {
  target: Target;
  text: string;
  share: string;
  of: string;
  pattern: string;
  entries: Entry[] | null;
  leads: string[] | null;
}

export interface ExcludedCard {
  target: Target;
  text: string;
}

export interface EntryList {
  course: number;
  title: string;
  hint: string;
  main: boolean;
  add: Target | null;
  items: EntryItem[] | null;
}

export interface Entry {
  target: Target;
  label: string;
  value: string;
  by: Certainty;
  options: Option[] | null;
  hint: string;
  open: boolean;
  aside: boolean;
}

export interface FileCard {
  id: string;
  name: string;
  sha256: string;
  size: string;
  uses: string[] | null;
  rejects: string[] | null;
  stated: string[] | null;
  reading: Entry[] | null;
}

export interface StudyEntry {
  number: number;
  at: string;
  what: string;
  why?: string;
  shown: boolean;
}

export interface Step {
  path: string;
  name: string;
  value: number | null;
  unit: string;
  formula: string;
  words: string;
  inputs: StepInput[] | null;
  again: number | null;
  agrees: boolean;
  origin: Origin | null;
  why: string;
}

export interface WalkInput {
  path: string;
  text: string;
}

export interface ReadColumn {
  name: string;
  unit: string;
  values: (number | null)[] | null;
}

export interface CodeEvidence {
  statement?: string;
  link?: string;
}

export interface CodeCheck {
  case: string;
  quantity: string;
  model: string;
  file: string;
  norm: string;
  unit: string;
  points: CodePoint[] | null;
  order: number | null;
  orders: (number | null)[] | null;
  notices: Notice[] | null;
}

export interface FileLine {
  id: string;
  name: string;
  sha256: string;
  bytes: number;
  matches: boolean;
  uses: string[] | null;
}

export interface Cell {
  case: string;
  condition: string;
  quantity: string;
  symbol: string;
  model: string;
  grid: string;
  steps?: StepStudy;
  borrowed?: Borrowed;
  reference: string;
  kind: string;
  use: string;
  unit: string;
  x_name: string;
  x_unit: string;
  scalar: boolean;
  downward: boolean;
  withheld: boolean;
  provisional: boolean;
  open: Open[] | null;
  courses: State[];
  choices: Choices;
  stations: Station[] | null;
  outside: (number | null)[] | null;
  stations_all: number;
  excluded: Excluded[] | null;
  conditions: Compared[] | null;
  application: Application | null;
  summary: Summary | null;
  joint: Joint | null;
  scores: ScoreLine[] | null;
  measured?: MeasureLine[];
  regions: RegionLine[] | null;
  crossings: Crossings;
  derived?: Derived;
  monitors: MonitorLine[] | null;
  balances: BalanceLine[] | null;
  grids: Grids | null;
  sources: SourceLine[] | null;
  degrees: number | null;
  k_95: number | null;
  requirement: Judgement | null;
  tried?: string[];
  fragile: Fragility[] | null;
  marine?: MarineLine;
  trend?: TrendLine;
  recorded?: RecordedLine[];
  known?: string;
  evidence?: EvidenceLine[];
  inputs?: InputLine[];
  input_form?: string;
  members?: MemberLine;
  distributions?: DistributionLine;
  shared?: SharedLine[];
  bound?: BoundLine;
  sampled?: SampledLine;
  replicates?: ReplicateLine;
  consistency?: ConsistencyLine[];
  resolution?: ResolutionLine;
  quality?: QualityLine[];
  bounding?: Bounding;
  residuals: ResidualLine[] | null;
  round_off: RoundOffLine | null;
  num_sums: NumSums | null;
  mapping?: string[];
  references?: ReferenceLine[];
  axes?: Axes[];
  corrected?: Correction;
  reduction?: Reduction;
  treatment?: Treatment;
  curve: Curve;
  notices: Notice[] | null;
  files_used: string[] | null;
}

export interface Difference {
  case: string;
  quantity: string;
  a: string;
  b: string;
  unit: string;
  n: number;
  mean: number | null;
  u: number | null;
  resolved: boolean;
  rms_a: number | null;
  rms_b: number | null;
  shared?: boolean;
}

export interface Signature {
  name: string;
  date: string;
}

export interface Figure {
  id: string;
  title: string;
  caption: string;
  alt: string;
  width: number;
  height: number;
  option: unknown;
  table: ChartTable;
}

export interface Phrase {
  text: string;
  mark: string;
  target: Target | null;
  path?: string;
  over?: string;
  value?: number;
}

export interface Open {
  course: number;
  blocks: boolean;
  missing: string;
  text: string;
  target: Target;
}

export interface BoardRow {
  case: string;
  quantity: string;
  stations: string;
  cells: (BoardCell | null)[] | null;
}

export type State = string;

export interface Headline {
  value: string;
  name: string;
}

export interface Table {
  title: string;
  head: string[] | null;
  rows: (string[] | null)[] | null;
}

export interface Sketch {
  own: ((number | null)[])[] | null;
  others: (((number | null)[])[] | null)[] | null;
  zero: number | null;
}

export interface EntryItem {
  remove: Target | null;
  entries: Entry[] | null;
}

export type Certainty = string;

export interface Option {
  value: string;
  label: string;
}

export interface StepInput {
  path: string;
  name: string;
  value: number | null;
  n: number;
}

export interface Origin {
  file: string;
  line: number;
  column: number;
  text: string;
  unit: string;
  of: string;
}

export interface CodePoint {
  grid: string;
  h: number | null;
  error: number | null;
}

export interface StepStudy {
  file: string;
  points: StepPoint[] | null;
  step_unit: string;
  joint: boolean;
  class: string;
  order: number | null;
  formal: number | null;
  space: number | null;
  extrapolated: number | null;
  space_error: number | null;
  time_error: number | null;
  scatter: number | null;
  u: number | null;
  u_num: number | null;
  rule: string;
}

export interface Borrowed {
  from: string;
  relative: number | null;
  penalty: number | null;
  u: number | null;
  why: string;
}

export interface Choices {
  k: number;
  k_num: number;
  bounded: boolean;
  rule?: string;
  formal: number;
  dimension: number;
  interpolation: Method;
  u_interp: boolean;
  safety?: number;
  num_shared: boolean;
  k_student?: boolean;
  sampled?: boolean;
  common_set?: boolean;
  num_linear?: boolean;
  gap?: number;
  period?: number;
  probe?: number;
  smooth?: number;
}

export interface Station {
  x: number | null;
  s: number | null;
  d: number | null;
  e: number | null;
  u_d: number | null;
  u_num: number | null;
  u_interp: number | null;
  u_input: number | null;
  u_val: number | null;
  ratio: number | null;
  lo: number | null;
  hi: number | null;
  line: number;
  weight?: number;
  reading: string;
  whitened: number | null;
  percent?: number;
}

export interface Excluded {
  x: number | null;
  d: number | null;
  line: number;
  why: string;
  late: boolean;
}

export interface Compared {
  name: string;
  unit: string;
  simulation: number | null;
  data: number | null;
  effect: number | null;
  handling: string;
  why: string;
}

export interface Application {
  text: string;
  outside: boolean;
  range: string;
  place?: AppliedPlace;
}

export interface Summary {
  n: number;
  tested: number;
  bias: number | null;
  mae: number | null;
  rmse: number | null;
  max_abs: number | null;
  max_at: number | null;
  max_ratio: number | null;
  within_u_val: number;
  within_k_u_val: number;
  beyond_chance: number | null;
}

export interface Joint {
  statistic: number | null;
  n: number;
  p_value: number | null;
  reference: number | null;
  exceeds: boolean;
  pattern: string;
  independent: number | null;
  num_shared: number | null;
  offset: number | null;
  u_offset: number | null;
  offset_part: number | null;
  remainder: number | null;
  remainder_n: number;
  remainder_reference: number | null;
  remainder_exceeds: boolean;
  offset_resolved: boolean;
  scale: number | null;
  u_scale: number | null;
  scale_part: number | null;
  shape_part: number | null;
  shape_n: number;
  scale_resolved: boolean;
  at_least: number | null;
  turns: Turning[] | null;
  without: Leaving[] | null;
  merged: number;
  worst: number | null;
  worst_at: number | null;
  condition: number | null;
  eigenvalues: (number | null)[] | null;
  correlations: CorrelationLine[] | null;
  station: Leaving | null;
  turning: number;
}

export interface ScoreLine {
  name: string;
  value: number | null;
  scale: string;
  word: string;
  criteria: CriterionLine[] | null;
}

export interface MeasureLine {
  name: string;
  value: number | null;
  u: number | null;
  floor: number | null;
  floor_hi: number | null;
  above: boolean;
}

export interface RegionLine {
  name: string;
  from: number | null;
  to: number | null;
  sign?: string;
  rest?: boolean;
  n: number;
  bias: number | null;
  rmse: number | null;
  hit_rate: number | null;
  beyond: number;
}

export interface Crossings {
  sim: Crossing[] | null;
  ref: Crossing[] | null;
}

export interface Derived {
  kind: string;
  formula: string;
  settings: DerivedSetting[] | null;
  sides: DerivedSide[] | null;
  effect: number | null;
  others: DerivedOther[] | null;
  propagation: string;
}

export interface MonitorLine {
  grid: string;
  file: string;
  quantity: string;
  unit: string;
  axis: string;
  x_name: string;
  class: string;
  rule: string;
  mean: number | null;
  u: number | null;
  entered: string;
  from: number | null;
  to: number | null;
  drift: number | null;
  change: number | null;
  per: number | null;
  limit: number | null;
  remaining: number | null;
  period: number | null;
  cycles: number;
  half_range: number | null;
  of_grid: number | null;
  sampling: Sampling | null;
  x: (number | null)[] | null;
  y: (number | null)[] | null;
}

export interface BalanceLine {
  grid: string;
  file: string;
  kind: string;
  in: number | null;
  out: number | null;
  net: number | null;
  scale: number | null;
  scale_of: string;
  fraction: number | null;
  limit: number | null;
  limit_of: string;
  of_grid: number | null;
  of_e: number | null;
  closed: boolean;
  effect: number | null;
  effect_why: string;
}

export interface Grids {
  points: GridPoint[] | null;
  dimension: number;
  class: string;
  ratio: number | null;
  order: number | null;
  formal: number | null;
  extrapolated: number | null;
  ea: number | null;
  eext: number | null;
  gci: number | null;
  u: number | null;
  u_num: number | null;
  k_num: number | null;
  rule: string;
  r21: number | null;
  r32: number | null;
  next_cells: number | null;
  next_cost: number | null;
  along: boolean;
  monotone: number;
  non_monotone: number;
  order_low: number | null;
  order_high: number | null;
  local: LocalGrid[] | null;
  card?: FamilyCard;
  rules?: RuleLine[];
  fit?: FitLine;
  stated?: StatedNext;
  cost_exponent?: number;
}

export interface SourceLine {
  name: string;
  of: string;
  text: string;
  u: number | null;
  share: number | null;
  pattern: string;
  origin: string;
  open: boolean;
}

export interface Judgement {
  limit: number | null;
  percent: number | null;
  who: string;
  date: string;
  late: boolean;
  outcome: string;
  at: number | null;
  u_val_needed: number | null;
  toward: string;
  u_num_needed: number | null;
  u_num_reduction: number | null;
  ways?: Way[];
}

export interface Fragility {
  change: string;
  what: string;
  from: string;
  outcome: string;
  detail: string;
  at?: number;
}

export interface MarineLine {
  k: number | null;
  e: number | null;
  u_v: number | null;
  required: number | null;
  orderings: OrderingLine[] | null;
}

export interface TrendLine {
  from: string;
  s: number | null;
  d: number | null;
  e: number | null;
  u: number | null;
  apart: number | null;
  lo: number | null;
  hi: number | null;
  reading: string;
  common: string[] | null;
}

export interface RecordedLine {
  what: string;
  in: number;
  at: string;
}

export interface EvidenceLine {
  what: string;
  from: string;
  given: boolean;
}

export interface InputLine {
  name: string;
  unit: string;
  nominal: number | null;
  u: number | null;
  sensitivity: number | null;
  data_sensitivity: number | null;
  method: string;
  shared: boolean;
  text: string;
  origin: string;
}

export interface MemberLine {
  n: number;
  u: number | null;
  mean: number | null;
  rank: number;
}

export interface DistributionLine {
  runs: number;
  readings: number;
  area: number | null;
  shift: number | null;
}

export interface SharedLine {
  source: string;
  u: number | null;
  left: number | null;
}

export interface BoundLine {
  half: number | null;
  at: number | null;
}

export interface SampledLine {
  at: number | null;
  value: number | null;
  u: number | null;
  lo: number | null;
  hi: number | null;
  level: number | null;
  draws: number;
  settled: boolean;
  minus: number | null;
  plus: number | null;
  shift: number | null;
}

export interface ReplicateLine {
  readings: number;
  stations: number;
  of: string;
  counts: string;
  u: number | null;
  degrees: number | null;
  s: number | null;
  plain: number | null;
  levels: LevelLine[] | null;
}

export interface ConsistencyLine {
  name: string;
  value: number | null;
  expected: number | null;
  u: number | null;
  ratio: number | null;
  holds: boolean;
}

export interface ResolutionLine {
  step: number | null;
  u: number | null;
  counted: boolean;
}

export interface QualityLine {
  item: string;
  state: string;
  note: string;
}

export interface Bounding {
  what: string;
  word: string;
  u_d: number | null;
  at: number | null;
  after: string;
}

export interface ResidualLine {
  grid: string;
  file: string;
  name: string;
  decades: number | null;
  per_first: number | null;
  per_last: number | null;
  per: number | null;
  from: number | null;
  to: number | null;
  stalled: boolean;
  x: (number | null)[] | null;
  y: (number | null)[] | null;
}

export interface RoundOffLine {
  grid: string;
  file: string;
  rms: number | null;
  max: number | null;
  n: number;
  doubt: boolean;
}

export interface NumSums {
  root: number | null;
  linear: number | null;
  apart: boolean;
}

export interface ReferenceLine {
  symbol: string;
  words: string;
  side: string;
  kind: string;
  value: number | null;
  u: number | null;
  unit: string;
  origin: string;
  formula: string;
}

export interface Axes {
  side?: string;
  origin: string;
  up: string;
  flow: string;
}

export interface Correction {
  state?: string;
  how?: string;
}

export interface Reduction {
  text: string;
  x: number | null;
  line: number;
  value: number | null;
  u: number | null;
  low: number | null;
  high: number | null;
  sampled: number | null;
  sampled_u: number | null;
  sampled_low: number | null;
  sampled_high: number | null;
  draws: number;
  agrees: boolean;
  inputs: ReducedInput[] | null;
}

export interface Treatment {
  orders: OrderLine[] | null;
  sampling: string;
  anchors: AnchorLine[] | null;
  plan: PlanLine | null;
  noise: NoiseLine | null;
  fit: DisplacementLine | null;
  integral: IntegralLine | null;
  weights: string;
}

export interface Curve {
  x: (number | null)[] | null;
  y: (number | null)[] | null;
  u_num: (number | null)[] | null;
}

export interface ChartTable {
  head: string[] | null;
  rows: (string[] | null)[] | null;
}

export interface BoardCell {
  id: string;
  courses: State[];
  letter: string;
  spoken: string;
}

export interface StepPoint {
  step: number | null;
  cells: number | null;
  value: number | null;
}

export type Method = string;

export interface AppliedPlace {
  state: string;
  names: string[] | null;
  units: string[] | null;
  at: (number | null)[] | null;
  beyond: number | null;
  nearest: string;
  distance: number | null;
  points: ComparedPoint[] | null;
}

export interface Turning {
  source: string;
  rho: number | null;
  at_0: number | null;
  at_1: number | null;
}

export interface Leaving {
  region: string;
  statistic: number | null;
  n: number;
  reference: number | null;
  exceeds: boolean;
}

export interface CorrelationLine {
  source: string;
  n: number;
  reference: number | null;
  low: number | null;
  points: CorrelationPoint[] | null;
  flips: (number | null)[] | null;
}

export interface CriterionLine {
  name: string;
  low: number | null;
  high: number | null;
  met: boolean;
  scope: string;
  source: string;
}

export interface Crossing {
  x: number | null;
  u: number | null;
  rising: boolean;
}

export interface DerivedSetting {
  name: string;
  value: string;
}

export interface DerivedSide {
  side: string;
  file: string;
  rows: number;
  value: number | null;
  u: number | null;
  at: number | null;
  at_unit: string;
  edge: number | null;
  edge_unit: string;
  overshoot: number | null;
  gap: number | null;
  bound: boolean;
  effects: DerivedEffect[] | null;
  places: DerivedPlace[] | null;
}

export interface DerivedOther {
  change: string;
  simulation: number | null;
  reference: number | null;
  e: number | null;
}

export interface Sampling {
  start_up: number;
  rows: number;
  sd: number | null;
  tau: number | null;
  independent: number | null;
  batches: number;
  u_batches: number | null;
  u_markov: number | null;
  share: number | null;
}

export interface GridPoint {
  name: string;
  cells: number | null;
  h: number | null;
  value: number | null;
  used: boolean;
  y_plus?: number;
}

export interface LocalGrid {
  x: number | null;
  class: string;
  order: number | null;
  u: number | null;
}

export interface FamilyCard {
  ratios: GridRatio[] | null;
  similar: string;
  wall: string;
  scheme: string;
  regime: string;
  settings: SettingLine[] | null;
}

export interface RuleLine {
  rule: string;
  u: number | null;
  u_num: number | null;
}

export interface FitLine {
  base: number | null;
  terms: FitTerm[] | null;
}

export interface StatedNext {
  u: number | null;
  cells: number | null;
  cost: number | null;
  met: boolean;
}

export interface Way {
  source: string;
  of: string;
  now: number | null;
  needed: number | null;
  reduction: number | null;
  cells?: number;
  cost?: number;
  readings?: number;
}

export interface OrderingLine {
  order: string;
  words: string;
  n: number;
}

export interface LevelLine {
  name: string;
  groups: number;
  degrees: number | null;
  deviation: number | null;
}

export interface ReducedInput {
  name: string;
  part: number | null;
  common: boolean;
}

export interface OrderLine {
  file: string;
  column: string;
  hash: string;
  sorted: boolean;
}

export interface AnchorLine {
  kind: string;
  x: number | null;
  value: number | null;
  why: string;
}

export interface PlanLine {
  at: string;
  late: boolean;
  changes: string[] | null;
}

export interface NoiseLine {
  s: number | null;
  rows: number;
  stated: number | null;
}

export interface DisplacementLine {
  n: number;
  rms: number | null;
  shift: number | null;
  shift_rms: number | null;
  scale: number | null;
  scale_rms: number | null;
  both_shift: number | null;
  both_scale: number | null;
  both_rms: number | null;
  at_edge: boolean;
}

export interface IntegralLine {
  e: number | null;
  s: number | null;
  d: number | null;
  u: number | null;
  length: number | null;
  whole: number | null;
  pieces: number;
}

export interface ComparedPoint {
  case: string;
  at: (number | null)[] | null;
}

export interface CorrelationPoint {
  rho: number | null;
  statistic: number | null;
}

export interface DerivedEffect {
  name: string;
  change: number | null;
  u: number | null;
}

export interface DerivedPlace {
  x: number | null;
  u: number | null;
  rising: boolean;
  chosen: boolean;
}

export interface GridRatio {
  fine: string;
  coarse: string;
  r: number | null;
}

export interface SettingLine {
  key: string;
  values: string[] | null;
  differs: boolean;
}

export interface FitTerm {
  coefficient: number | null;
  power: number | null;
}
