import type { MeasureKey } from '$lib/model/quantities';
import type { EventRecord } from '$lib/model/series';
import type { SeriesId, SignalKey } from '$lib/model/signals';
import type { Refrigerant } from '$lib/model/unit';

/** One file of an upload. `open` may be called several times: reading looks first and converts after. */
export type SourceFile = {
	name: string;
	/** Bytes as uploaded, for progress. */
	size: number;
	open(): AsyncIterable<Uint8Array>;
};

/** A unit that columns may belong to. */
export type UnitRef = {
	unitId: string;
	tag: string;
	refrigerant: Refrigerant;
	circuits: number;
	ratedAmps: number | null;
};

/** A mapping that a person confirmed (or that was sure) for a header shape of this site. */
export type RememberedMapping = {
	headerSignature: string;
	mapping: readonly ColumnMapping[];
	choices: Readonly<Record<string, string>>;
	/** Confirmed at another site of the organisation: its signals hold here, its units of measure need not. */
	elsewhere?: boolean;
};

/** What reading needs to know from outside the files. Plain data: it crosses to a worker thread. */
export type ReadContext = {
	/** The unit the log was uploaded to. */
	unit: UnitRef;
	/** The other units of the same site. */
	siblings: readonly UnitRef[];
	/** IANA zone of the site. */
	timeZone: string;
	/** IANA zone or fixed offset the uploader named, before any guess. */
	zoneOverride: string | null;
	/** kPa absolute at the site. */
	airPressure: number;
	/** ms UTC; stamps beyond it are not believed. */
	now: number;
	remembered: readonly RememberedMapping[];
	/** Ask a person even when sure (the page's default); false is `mapping=auto`. */
	ask: boolean;
	/** Answers to choices of an earlier inspection, by choice key. */
	answers?: Readonly<Record<string, string>>;
};

/** Something wrong with a place in the log. `line` counts from 1 in its file. */
export type Problem = { file: string; line: number | null; column: string | null; kind: string; message: string };

/** As api.md's `mapping[]`. `column` is the name as printed, made unique within its file. */
export type ColumnMapping = {
	file: string;
	column: string;
	signal: SignalKey | null;
	unitId: string;
	circuit: string;
	unitOfMeasure: MeasureKey | null;
	/** 0…1: how often a guess like this is right. */
	confidence: number;
	confirmed: boolean;
};

export type ColumnRole = 'time' | 'signal' | 'point-name' | 'value' | 'status' | 'unknown';

/** A column (or a point of a long layout) with its guess and what a person needs to judge it. */
export type InspectedColumn = {
	file: string;
	column: string;
	role: ColumnRole;
	guess: ColumnMapping;
	/** Why the guess is what it is, in plain words. */
	reasons: string[];
	/** In the file's own figures. */
	range: { least: number; most: number } | null;
	/** At most 120 readings spread over the log, file's own figures, null = no reading. */
	trace: (number | null)[];
	/** Cells of this column at the inspection's `lines`. */
	cells: string[];
};

/** An ambiguity with the choice made. `sure` false: nothing settled it, a person answers. */
export type Choice = {
	key: string;
	question: string;
	chosen: string;
	options: { value: string; label: string; sample: string }[];
	sure: boolean;
};

/** As api.md's `layout`. */
export type Layout = {
	kind: 'wide' | 'long' | 'per-signal';
	delimiter: string;
	decimal: '.' | ',';
	encoding: string;
	headerLine: number;
	timeForm: string;
	timeZone: string;
	intervalSeconds: number | null;
};

/** How one file is to be read: decided while looking, obeyed while converting. Plain JSON. */
export type FilePlan = {
	/** Name as shown: with the archive's path where it came out of one. */
	file: string;
	/** Index into the upload's files, and the entry inside that file's archive (nested: two names), or sheet. */
	source: number;
	entry: string[];
	container: 'text' | 'sheet' | 'haystack-json';
	/** `events`: an alarm or event history; `empty`: nothing to read in it, and that is no fault. */
	kind: 'wide' | 'long' | 'per-signal' | 'events' | 'empty';
	delimiter: string;
	decimal: '.' | ',';
	encoding: string;
	/** Line of the last header row (0: no header); data begin after `dataLine - 1`. */
	headerLine: number;
	dataLine: number;
	/** Cells of a row. */
	width: number;
	/** The header's row without blanks and quotes, so that its repetition in mid-file is known. */
	headerText: string;
	time: TimePlan;
	columns: ColumnPlan[];
	/** Long and event layouts: where their cells stand. */
	roles: RowRoles;
	intervalSeconds: number | null;
	/** Most lines the look passed over, for progress. */
	lines: number;
};

/** Positions of the cells of long and event rows; −1 = not there. A point's name may be spread over several cells. */
export type RowRoles = {
	names: number[];
	value: number;
	status: number;
	unit: number;
	text: number;
	code: number;
	severity: number;
	/** Raised, cleared or acknowledged; or the time of clearing. */
	state: number;
	clearedAt: number;
};

export type DateOrder = 'ymd' | 'dmy' | 'mdy' | 'md' | 'dm' | 'epoch-s' | 'epoch-ms' | 'serial';

/** How stamps are written and in which zone they are. */
export type TimePlan = {
	/** Column of the stamp or of its date; and of its clock when apart (−1: in the same cell). */
	column: number;
	clockColumn: number;
	order: DateOrder;
	/** The year of the first row when stamps carry none. */
	year: number | null;
	/** IANA zone or `+hh:mm`; stamps with their own offset ignore it. */
	zone: string;
	/** Stamps carry an offset or abbreviation of their own. */
	carriesZone: boolean;
	/** Newest row first. */
	descending: boolean;
	/** In words, for the page: `month/day/year, 12 hours`. */
	form: string;
};

/** How one column, or one point of a long layout, is converted. */
export type ColumnPlan = {
	/** Position in the row; −1 for a point of a long layout, found by name. */
	index: number;
	column: string;
	logging: 'interval' | 'change';
	/** Smallest step seen, file's own figures, or null. */
	increment: number | null;
	/** Usual time between its readings, or null. */
	spacingSeconds: number | null;
	/** Mostly words, not numbers. */
	words: boolean;
	role: ColumnRole;
};

/** What looking at a log gives. Plain JSON: stored until a person has confirmed the mapping. */
export type Inspection = {
	decision: 'ready' | 'needs-mapping' | 'refused';
	/** Why a person is needed, one sentence each. */
	questions: string[];
	layout: Layout | null;
	files: FilePlan[];
	columns: InspectedColumn[];
	/** Line numbers of the columns' `cells`, in the first file. */
	lines: number[];
	choices: Choice[];
	problems: Problem[];
	/** The header's shape: equal shapes share a remembered mapping. */
	headerSignature: string;
	/** The mapping as guessed or remembered: what `auto` goes on with. */
	mapping: ColumnMapping[];
};

/** A stretch of one signal's readings, ready to be coded and stored. Nothing writes to the arrays afterwards. */
export type RawBlock = {
	unitId: string;
	circuit: string;
	signal: SeriesId;
	/** Which file of the upload (index into `Inspection.files`). */
	fileIndex: number;
	/** UTC day, `2025-03-05`, and the part within it, from 0. */
	day: string;
	part: number;
	/** ms UTC, strictly rising; shared by reference between the blocks of one chunk where they are row-aligned. */
	t: Float64Array;
	/** Stored units, NaN = no reading. */
	v: Float64Array;
	logging: 'interval' | 'change';
	/** Smallest step in stored units, or null. */
	increment: number | null;
	/** Set when the stored unit is not the quantity's usual one (`pctRated`). */
	measure: string | null;
	/** Stored = figure in the file × factor + offset: lets the codec store the file's own few digits. */
	scale: Scale;
};

/** A figure becomes `factor · figure + offset`. */
export type Scale = { factor: number; offset: number };

/** Words of a mode, limit or alarm column: rows where the text changed, and the first of each chunk. */
export type TextBlock = {
	unitId: string;
	circuit: string;
	signal: SeriesId;
	fileIndex: number;
	day: string;
	part: number;
	t: Float64Array;
	text: string[];
};

/** A line of an alarm or event history, or the rise of an alarm column. */
export type ReadEvent = EventRecord & { unitId: string; circuit: string };

/** Where readings go. Awaited one after another, so that a slow store slows the reader and memory stays flat. */
export type ReadSink = {
	block(block: RawBlock): Promise<void>;
	text(block: TextBlock): Promise<void>;
	event(event: ReadEvent): Promise<void>;
};

export type Quality = {
	gaps: number;
	longestGapSeconds: number;
	repeats: number;
	outOfOrder: number;
	/** By kind: blank, dashes, word, sentinel, impossible, unreadable, time, formula, status. */
	badValues: Record<string, number>;
	/** Share of the span from first to last with readings. */
	coverage: number;
};

export type SignalQuality = {
	unitId: string;
	circuit: string;
	signal: SeriesId;
	column: string;
	samples: number;
	bad: number;
	spacingSeconds: number | null;
	logging: 'interval' | 'change';
	/** Notes for the quality report: never moves, equal to another column, … */
	notes: string[];
	/** Stretches with readings, ms UTC, at most 400. */
	covered: { from: number; to: number }[];
};

export type ReadResult = {
	rows: number;
	samples: number;
	events: number;
	/** ms UTC */
	firstAt: number | null;
	lastAt: number | null;
	quality: Quality;
	signals: SignalQuality[];
	/** Capped; the last entry then counts the rest. */
	problems: Problem[];
	/** Set when reading found what looking could not: nothing of this log is to be kept. */
	refused: boolean;
};

export type Progress = { bytes: number; totalBytes: number; rows: number };

/** A refusal of the whole log, with its place and reason. */
export class LogRefusal extends Error {
	readonly kind: string;
	readonly file: string;
	readonly line: number | null;
	constructor(kind: string, message: string, file = '', line: number | null = null) {
		super(message);
		this.name = 'LogRefusal';
		this.kind = kind;
		this.file = file;
		this.line = line;
	}
}
