/**
 * The trade's words and abbreviations, each with the ideas it stands for. Single words and their common contractions;
 * a column's name is the set of ideas its words give. From memory: common practice, no source; Haystack tags and Brick
 * class names fall out of the same words.
 */
export type Idea =
	| 'evap'
	| 'cond'
	| 'water'
	| 'refrigerant'
	| 'air'
	| 'leaving'
	| 'entering'
	| 'supply'
	| 'return'
	| 'temperature'
	| 'pressure'
	| 'difference'
	| 'flow'
	| 'level'
	| 'position'
	| 'current'
	| 'rated'
	| 'power'
	| 'voltage'
	| 'speed'
	| 'saturation'
	| 'boiling'
	| 'suction'
	| 'discharge'
	| 'liquid'
	| 'line'
	| 'oil'
	| 'oilPlace'
	| 'filter'
	| 'heater'
	| 'pump'
	| 'fan'
	| 'expansion'
	| 'valve'
	| 'economiser'
	| 'injection'
	| 'solenoid'
	| 'outdoor'
	| 'motor'
	| 'compressor'
	| 'unit'
	| 'winding'
	| 'phase'
	| 'run'
	| 'status'
	| 'proof'
	| 'command'
	| 'start'
	| 'stop'
	| 'starts'
	| 'hours'
	| 'demand'
	| 'capacity'
	| 'load'
	| 'slide'
	| 'vanes'
	| 'stage'
	| 'limit'
	| 'active'
	| 'mode'
	| 'alarm'
	| 'setpoint'
	| 'percent'
	| 'average'
	| 'neutral'
	| 'extreme'
	| 'foreign'
	| 'derived'
	| 'rate';

const LEXICON = new Map<string, readonly Idea[]>();
function say(phrases: string, ...ideas: Idea[]): void {
	for (const phrase of phrases.split('|')) LEXICON.set(phrase, ideas);
}

say('evap|evaporator|evapr|evp|evaporateur|verdampfer|cooler|evap shell|chiller barrel|barrel', 'evap');
say('cond|condenser|cnd|condensor|kondensator|verflussiger|condenseur|cdsr|cd|cdr', 'cond');
say(
	'chilled water|chw|chilled wtr|chill water|chlw|chl water|ch water|chilled fluid|chilled|chwater|kaltwasser|cold water',
	'evap',
	'water'
);
say('chws|chwsupply|chilledwatersupply', 'evap', 'water', 'supply');
say('chwst|chwsupplytemp', 'evap', 'water', 'supply', 'temperature');
say('chwr|chwreturn', 'evap', 'water', 'return');
say('chwrt', 'evap', 'water', 'return', 'temperature');
say('lchwt|lchw|elwt|chwlt|chwot|lcht', 'evap', 'water', 'leaving', 'temperature');
say('echwt|echw|eewt|chwet|chwit|echt', 'evap', 'water', 'entering', 'temperature');
say('lwt|lwtemp|owt', 'water', 'leaving', 'temperature');
say('ewt|ewtemp|iwt', 'water', 'entering', 'temperature');
say(
	'condenser water|cond water|cond wtr|cdw|cw|cnw|cndw|cws water|tower water|cond fluid|kuhlwasser|cooling water|cooling wtr|heat rejection water',
	'cond',
	'water'
);
say('cws|cdws|cnws', 'cond', 'water', 'supply');
say('cwst|cdwst|cnwst', 'cond', 'water', 'supply', 'temperature');
say('cwr|cdwr|cnwr', 'cond', 'water', 'return');
say('cwrt|cdwrt|cnwrt', 'cond', 'water', 'return', 'temperature');
say('ecwt|cewt|ecdwt|ecw|cwet|cwit|ect', 'cond', 'water', 'entering', 'temperature');
say('lcwt|clwt|lcdwt|lcw|cwlt|cwot|lct', 'cond', 'water', 'leaving', 'temperature');
say('sst|satsuct|setemp|sat suct', 'evap', 'saturation', 'temperature');
say('sct|sdt|scdt', 'cond', 'saturation', 'temperature');
say('sat|saturated|saturation|satd|satn|sattemp|saturating', 'saturation');
say('evaporating|evaporation|evapg', 'evap', 'boiling');
say('condensing|condensation|condg', 'cond', 'boiling');
say('suct|suction|suc|suctn|sctn|saug', 'suction');
say('disch|discharge|dis|dsch|dschg|disc|dschrg|dischg|dchg|hot gas|hotgas|druckgas', 'discharge');
say('liq|liquid|lqd', 'liquid');
say('liquid line|liq line|liqline|ll|liq ln', 'liquid', 'line');
say('temp|temperature|tmp|temps|tempr|tem|t|temperatur|deg|tt|degf|degc', 'temperature');
say('press|pressure|prs|pr|pres|prss|p|druck|pt|psi|psig|psia|kpa|bar|barg', 'pressure');
say(
	'dp|delta p|diff press|diff pressure|differential pressure|press diff|pressure diff|pressure difference|pressure drop|press drop|pd|diff p',
	'pressure',
	'difference'
);
say('diff|differential|delta|difference|drop|dt|delta t|range', 'difference');
say('flow|flw|flowrate|flow rate|flo|gpm|lps|durchfluss', 'flow');
say('level|lvl|lev|niveau', 'level');
say('pos|posn|position|opening|travel|stroke|pctopen|pct open|open pct|posit', 'position');
say('amps|amp|current|amperage|amperes|ampere|cur|curr|strom|motor load|motor amps|mtr amps', 'current');
say('rla|fla|pct rla|pct fla|rated load amps|full load amps|rated amps', 'current', 'rated');
say('kw|power|watts|kilowatts|kilowatt|leistung|pwr', 'power');
say('volts|voltage|volt|v|spannung', 'voltage');
say('speed|freq|frequency|hz|rpm|spd|drehzahl|vfd|vsd|drive|inverter', 'speed');
say('oil|lube', 'oil');
say('sump|separator|sep|feed|reservoir|tank|crankcase|pan|oil sep', 'oilPlace');
say('crankcase heater|cch|crankcase htr|sump heater|sump htr', 'oil', 'heater');
say('filter|strainer|fltr|filt', 'filter');
say('heater|htr|heat|heating element', 'heater');
say('pump|pmp', 'pump');
say('chwp|chw pump|pchwp|chilled water pump|chwpump', 'evap', 'water', 'pump');
say('cwp|cdwp|cnwp|cwpump|cdwpump', 'cond', 'water', 'pump');
say('fan|fans', 'fan');
say(
	'exv|eev|eexv|exvalve|txv|tev|expansion valve|exp valve|expn valve|expansion|metering valve|electronic expansion valve|feed valve|refrigerant valve|refrig valve|txvalve|exp vlv|expansion vlv|metering device',
	'expansion'
);
say('valve|vlv|val ve', 'valve');
say('economizer|economiser|econ|eco', 'economiser');
say('injection|inj|liquid injection|liq inj|liq injection|inject', 'injection');
say('solenoid|sol|slnd|sv', 'solenoid');
say('lls|llsv|llsol|ll solenoid|liquid line solenoid', 'liquid', 'line', 'solenoid');
say('outdoor|outside|ambient|osa|amb|oa|od|outside air|outdoor air|aussen', 'outdoor');
say('oat|odt|oadb|oaT', 'outdoor', 'temperature');
say('air', 'air');
say('eat|cond air|coil air|condenser air', 'cond', 'air');
say('water|wtr|h 2 o|h2o|fluid|brine|glycol|w|wasser|eau', 'water');
say('leaving|lvg|leave|lv|out|outlet|exit|exiting|lvng|outgoing|lving|lev ing|austritt|sortie|vorlauf', 'leaving');
say('entering|ent|entr|in|inlet|entg|incoming|enter|entrg|eintritt|entree|rucklauf', 'entering');
say('supply|sup|sply|spl', 'supply');
say('return|rtn|ret', 'return');
say('refrigerant|refrig|refr|rfgt|rfrg|rfg|ref|gas|refg|vapor|vapour', 'refrigerant');
say(
	'head pressure|head press|high side pressure|high pressure|high press|hi press|hi pressure|hp|high side press|hochdruck',
	'cond',
	'pressure'
);
say(
	'low side pressure|low pressure|low press|lo press|lp|low side press|back pressure|niederdruck',
	'evap',
	'pressure'
);
say('motor|mtr', 'motor');
say('compressor|comp|cmp|compr|cprsr|cpr|verdichter|compresseur|cmpr|screw', 'compressor');
say('chiller|chlr|unit|machine|chill er|package', 'unit');
say('winding|windings|stator|wdg|wndg', 'winding');
say('phase|ph|leg|l 1|l 2|l 3|l 1 l 2|l 2 l 3|l 3 l 1|ia|ib|ic|phs', 'phase');
say('vab|vbc|vca|l 1 l 2 volts', 'phase', 'voltage');
say('run|running|on|on off|onoff|run status|running status|lauft|betrieb', 'run');
say('status|sts|stat|state|st|fb|fdbk|feedback|zustand', 'status');
say('proof|proven|proving|prove|prf|confirm|established|made', 'proof');
say('switch|sw|flow switch', 'proof');
say('flow switch|flow sw|fs|flowswitch|flow proof|flow proven|flow proving|flow status|paddle', 'flow', 'proof');
say(
	'cmd|command|enable|enabled|call|request|requested|req|ss|start stop|startstop|ena|enbl|required|commanded|befehl',
	'command'
);
say(
	'start command|start cmd|start signal|start request|run command|run cmd|run enable|run request|start enable',
	'start',
	'command'
);
say('start', 'start');
say('stop', 'stop');
say(
	'starts|start count|start counter|starts counter|number of starts|no of starts|nr of starts|num starts|number starts|total starts|starts total|starts count|startcount|numstarts|start counts',
	'starts'
);
say(
	'hours|run hours|runtime|run time|op hours|operating hours|hrs|run hrs|hour meter|hour run|hours run|oper hours|operation hours|runhours|runhrs|op hrs|betriebsstunden|hour',
	'hours'
);
say('demand|dmd|demanded', 'demand');
say('capacity|cap|capac|capy|capacite', 'capacity');
say('load|loading|loaded|last|charge', 'load');
say('slide|slide valve|slidevalve|slide vlv|slider|sv pos', 'slide');
say('vane|vanes|igv|guide vane|guide vanes|inlet guide vane|inlet guide vanes|inlet vane|inlet vanes', 'vanes');
say('stage|stages|step|steps|stg', 'stage');
say('limit|lim|limiting|limiter|lmt', 'limit');
say('active|actv', 'active');
say('mode|operation mode|control mode|opmode|operating mode', 'mode');
say(
	'alarm|alarms|alm|fault|faults|flt|trip|trips|tripped|safety|warning|message|lockout|failure|cutout|cut out|shutdown|error|alrm|diagnosis|alarm text|fault code|alarm code',
	'alarm'
);
say('setpoint|set point|setpt|stpt|stp|sp|spt|set|setp|target|sollwert|csp|set pt|setting|consigne', 'setpoint');
say('pct|percent|percentage|prc', 'percent');
say('average|avg|ave|mean|total|tot|overall', 'average');
say(
	'actual|act|measured|meas|sensor|sens|sen|probe|value|val|pv|reading|input|ai|ao|di|do|bi|bo|av|bv|point|analog|analogue|binary|calc|calculated|the|of|to|and|for|at|is|log|trend|data|present|line in|digital|number|no|nr|ctrl|control|controller|operating|oper|op|operation|system|loop|process|primary|main|live|now|his|cur val|curval|equip|sensor 1|transducer|xdcr|xducer|thermistor|signal|output|raw|display|displayed|shell|side|bundle',
	'neutral'
);
say('max|min|maximum|minimum|high|low|hi|lo|peak|lowest|highest', 'extreme');
say(
	'zone|room|space|duct|boiler|hot water|hw|hws|hwr|domestic|humidity|rh|wet bulb|wetbulb|wb|dew point|dewpoint|kwh|mwh|energy|cop|efficiency|kw per ton|kw ton|tons|ton|tonnage|btu|btuh|thd|factor|power factor|pf|price|cost|co 2|co2|vibration|ahu|vav|heat exchanger|filter hours|building|valve hours|bypass|tower fan|makeup|free cooling|battery|cpu|bearing|purge|kvar|kva|kvarh',
	'foreign'
);
say(
	'superheat|sh|super heat|superht|dsh|ssh|subcooling|subcool|sub cooling|subcl|approach|appr|apprch|lift|margin|dew',
	'derived'
);
say('rate|ramp|slope|per minute|per hour|trend rate', 'rate');
say('subcooled', 'liquid');

const LONGEST = 4;

/** One run of words that was understood, or a word that was not (`ideas` empty). */
export type Sense = { words: string; ideas: readonly Idea[] };

/** Reads words by the longest phrases the lexicon knows. */
export function sensesOf(words: readonly string[]): Sense[] {
	const out: Sense[] = [];
	for (let i = 0; i < words.length;) {
		let n = Math.min(LONGEST, words.length - i);
		for (; n > 0; n--) {
			const phrase = words.slice(i, i + n).join(' ');
			const ideas = LEXICON.get(phrase) ?? (n > 1 ? LEXICON.get(phrase.replace(/ /g, '')) : undefined);
			if (!ideas) continue;
			out.push({ words: phrase, ideas });
			break;
		}
		if (n === 0) {
			const word = words[i] ?? '';
			const parts = split(word);
			if (parts) out.push(...parts);
			else out.push({ words: word, ideas: [] });
		}
		i += Math.max(1, n);
	}
	return out;
}

/** A run-together name in lower case (`evapsattemp`, `oiltemp`): two or three words the lexicon knows, each of three letters or more. */
function split(word: string): Sense[] | null {
	if (word.length < 6 || word.length > 30 || /\d/.test(word)) return null;
	const ends = (from: number, left: number): Sense[] | null => {
		if (from === word.length) return [];
		if (left === 0) return null;
		for (let to = word.length; to >= from + 3; to--) {
			const piece = word.slice(from, to);
			const ideas = LEXICON.get(piece);
			if (!ideas) continue;
			const rest = ends(to, left - 1);
			if (rest) return [{ words: piece, ideas }, ...rest];
		}
		return null;
	};
	return ends(0, 4);
}
