import type { SuspectRow } from '../clue-rule';
import { fouledEvaporator, oilInEvaporator } from './evaporator';
import { lowRefrigerantCharge, liquidLineRestriction } from './liquid';
import { valveOverfeeding, valveUnderfeeding } from './valve';
import { economiserOrInjection, suctionRestriction } from './vapour';
import { fouledCondenser, nonCondensables } from './condenser';
import { coldCondenserWater, lowPressureDifference } from './head';
import { slideNotLoading, slideNotUnloading } from './load';
import { lowOil, oilRestriction } from './oil';
import { limitsOrSetup, plantStaging, starterOrSupply } from './plant';
import { oilHeater, refrigerantMigration, valveLeakingBack } from './rest';
import { evapSaturationSensor, suctionTemperatureSensor } from './sensors';
import { flowProving, lowWaterFlow, waterShortCircuit } from './water';

/**
 * Every suspect, in the order of thought: is the low saturation real? → water → oil → load → feed → high side → plant.
 * A new suspect is a row here and its test. Signatures are common practice of the trade without a published source;
 * weights are this product's own until checked on repaired cases.
 */
export const SUSPECT_TABLE: readonly SuspectRow[] = [
	evapSaturationSensor,
	suctionTemperatureSensor,
	lowWaterFlow,
	flowProving,
	waterShortCircuit,
	fouledEvaporator,
	lowOil,
	oilRestriction,
	oilInEvaporator,
	refrigerantMigration,
	oilHeater,
	slideNotUnloading,
	slideNotLoading,
	valveUnderfeeding,
	valveOverfeeding,
	lowRefrigerantCharge,
	liquidLineRestriction,
	suctionRestriction,
	valveLeakingBack,
	economiserOrInjection,
	coldCondenserWater,
	lowPressureDifference,
	fouledCondenser,
	nonCondensables,
	starterOrSupply,
	limitsOrSetup,
	plantStaging
];
