import type { MethodSection } from './types';

/** From a log to a time base, and the quantities worked out sample by sample. */
export const TIME_SECTION: MethodSection = {
	key: 'time',
	title: 'From a log to a time base',
	lead: 'Nothing is invented between two readings: a blank cell is no reading, a gap is no stop.',
	entries: [
		{
			name: 'Instants',
			says: 'Kept in UTC. A stamp without an offset is read in the log’s zone, the site’s unless a person says otherwise. The hour that comes twice in autumn is told apart by the order of the rows.',
			origin: 'source',
			source: 'IANA time zone database; ISO 8601'
		},
		{
			name: 'Gap',
			says: 'A hole longer than three times the local spacing of the signal, and than a minute. Spacing is measured in each running state, since many loggers slow down while the unit is off.',
			formula: 'gap > max(3 × local spacing, 60 s)',
			origin: 'ours'
		},
		{
			name: 'Logs of changes',
			says: 'On/off, setpoint and alarm columns hold to the next record; measured values hold for a quarter of an hour. Neither is joined by a sloping line.',
			origin: 'ours'
		},
		{
			name: 'Columns',
			says: 'Name, unit of measure, range and behaviour must agree. Under a confidence of 0.80 a person is asked.',
			origin: 'ours'
		},
		{
			name: 'Gauge and absolute',
			says: 'Pressures are kept absolute. What gauges read is taken from the air pressure at the site’s altitude, in the standard atmosphere.',
			formula: 'p air = 101.325 · (1 − 2.25577·10⁻⁵ · h)^5.25588 kPa, h in m',
			origin: 'source',
			source: 'International Standard Atmosphere (ISO 2533)'
		}
	]
};

export const DERIVED_SECTION: MethodSection = {
	key: 'derived',
	title: 'Quantities worked out from two signals',
	lead: 'Both readings must be fresh, within one spacing of each other; otherwise the quantity is absent.',
	entries: [
		{
			name: 'Saturation from pressure',
			says: 'For R-134a, R-22, R-123, R-1234ze(E), R-1234yf, R-410A and R-407C by published vapour-pressure equations; R-513A and R-514A by fits to mixture equations, the latter approximate.',
			formula: 'p = p r · exp[(T r / T) · Σ nᵢ · θ^tᵢ], θ = 1 − T / T r',
			origin: 'source',
			source:
				'Tillner-Roth & Baehr, J. Phys. Chem. Ref. Data 23 (1994) 657; Kamei et al., Int. J. Thermophys. 16 (1995) 1155; Younglove & McLinden, JPCRD 23 (1994) 731; Thol & Lemmon, IJT 37 (2016); Richter et al., J. Chem. Eng. Data (2011); Lemmon, IJT 24 (2003) 991; coefficients from CoolProp (MIT)'
		},
		{
			name: 'Superheat and subcooling',
			says: 'Suction temperature over the dew point of the evaporating pressure; bubble point of the condensing pressure over the liquid’s temperature. Discharge superheat is over the condensing dew point.',
			origin: 'practice'
		},
		{
			name: 'Approaches',
			says: 'Leaving water over evaporator saturation; condensing saturation over leaving condenser water.',
			origin: 'practice'
		},
		{
			name: 'Margin and lift',
			says: 'Margin is oil temperature over condensing saturation. Lift is condensing over evaporator saturation. Where a glide exceeds 0.5 K and the side of a logged saturation is unknown, the margin cannot be told.',
			origin: 'ours'
		},
		{
			name: 'Duty',
			says: 'Water flow times density times heat capacity times the water’s difference, with the properties of water at its temperature, or of the glycol that is named.',
			formula: 'Q = V̇ · ρ · cp · (entering − leaving); 12,000 Btu/h = 1 ton',
			origin: 'source',
			source: 'IAPWS-95; IAPWS SR6-08'
		}
	]
};
