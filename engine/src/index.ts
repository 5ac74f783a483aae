export { parseSessionStudy, parseStudy, parseStudyText } from './study/parse-study.ts';
export { partIssues } from './study/part-issues.ts';
export { pathText } from './study/study-issues.ts';
export { StudyError, type StudyErrorCode, type StudyIssue } from './study/study-error.ts';
export { quantities, type QuantityPath } from './study/quantities.ts';
export type { Quantity } from './study/quantity.ts';
export { partSchemas, sessionStudySchema, studySchema, tripStudySchema } from './study/schema.ts';
export type {
  Boost,
  Cell,
  Inlet,
  Leg,
  Pack,
  Session,
  SessionStudy,
  SessionStudyInput,
  Station,
  Strategy,
  Study,
  Taper,
  Thermal,
  TripStudy,
  TripStudyInput,
  Vehicle,
} from './study/schema.ts';
export { electrodePairs, potentialsOf, type ElectrodePair } from './cell/electrodes.ts';
export { limitCodes, limitSide, type LimitCode } from './session/limits.ts';
export type * from './session/result.ts';
export {
  simulateSession,
  type RunStatistics,
  type SessionOptions,
  type SessionRun,
} from './session/simulate-session.ts';
export { thermalAnalysis, type SteadyState, type ThermalAnalysis } from './thermal/thermal-analysis.ts';
export { runStudy, type StudyResult } from './run-study.ts';
export { studyJsonSchema } from './study/json-schema.ts';
export type * from './trip/result.ts';
export { simulateTrip, type TripOptions } from './trip/simulate-trip.ts';
export { PiecewiseCubic } from './table/piecewise-cubic.ts';
export { parseTuneRequest, tuneJsonSchema, tuneRequestSchema } from './study/tune-request.ts';
export type { TuneRequest, TuneRequestInput } from './study/tune-request.ts';
export { boundNames, tuneBounds, type BoundName } from './study/tune-bounds.ts';
export { TuneCancelled, tuneSteps, tuneTaper, type TuneOptions } from './tune/tune-taper.ts';
export type { TuneProgress } from './tune/work-plan.ts';
export type * from './tune/tune-result.ts';
export { roomAboveTaper, type RoomAboveTaper } from './tune/room-above-taper.ts';
export { convertTaper, type ConvertedTaper } from './tune/convert-taper.ts';
export { engineVersion } from './engine-version.ts';
export { parseSweep, parseSweepText } from './sweep/parse-sweep.ts';
export { MOST_CELLS, sweepJsonSchema, sweepParts, type SweepPart, type SweepStudyInput } from './study/sweep-schema.ts';
export { studyInputs, type StudyInput } from './sweep/input-path.ts';
export {
  cellStudy,
  changesOf,
  changeText,
  coordinatesOf,
  indexAt,
  lengthOf,
  type GridPlan,
  type MovedInput,
  type NumberAxis,
  type PartAxis,
  type SampledInput,
  type SensitivityPlan,
  type SpreadPlan,
  type SweepAxis,
  type SweepPlan,
} from './sweep/sweep-plan.ts';
export { curveSocPercent, endReasons, sweepMetrics, type SweepMetric } from './sweep/sweep-metrics.ts';
export { CELL, failedChunk, runCells, type CellFailure, type SweepChunk } from './sweep/run-cells.ts';
export { SweepResult } from './sweep/sweep-result.ts';
export { decodeSweep, encodeSweep, SweepDataError, type SweepDataCode } from './sweep/sweep-bytes.ts';
export { limitBorders, type LimitBorder } from './sweep/limit-borders.ts';
export { sliceValues, type Slice } from './sweep/slice.ts';
export { sensitivityRows, type SensitivityRow } from './sweep/sensitivity.ts';
export { curveBands, metricBand, spreadPercentiles, type Band } from './sweep/spread-bands.ts';
