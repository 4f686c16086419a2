import type { RecordReading } from './types'

/**
 * A reading that reached the record only in part, filled up with what an earlier one of the same patient brought. Nothing of it
 * passes for new: values carry their own dates, the parts still say what could not be looked at, and the whole stays incomplete.
 *
 * Nothing is carried over where the reading casts doubt on whose record it is.
 */
export function withEarlier(reading: RecordReading, earlier: RecordReading | null): RecordReading {
  if (!earlier || reading.state !== 'incomplete' || earlier.ehrPatientId !== reading.ehrPatientId || isDoubtful(reading) || isDoubtful(earlier)) return reading
  const missed = (name: keyof RecordReading['parts']) => reading.parts[name].state === 'could-not-look'
  return {
    ...reading,
    readings: reading.parts.laboratory.complete ? reading.readings : joined(reading.readings, earlier.readings, row => row.id),
    laboratoryEgfr: reading.parts.pregnancy.complete ? reading.laboratoryEgfr : joined(reading.laboratoryEgfr, earlier.laboratoryEgfr, row => row.observationId),
    exposures: reading.parts.exposures.complete ? reading.exposures : joined(reading.exposures, earlier.exposures, row => row.id),
    weight: reading.weight ?? (missed('weight') ? earlier.weight : null),
    height: reading.height ?? (missed('height') ? earlier.height : null),
    allergies: missed('allergies') ? earlier.allergies : reading.allergies,
    conditions: missed('conditions') ? earlier.conditions : reading.conditions,
  }
}

function isDoubtful({ warnings, parts }: RecordReading): boolean {
  return warnings.some(warning => warning.id === 'birth-date-differs') || parts.patient.problem === 'not-found' || parts.patient.problem === 'other-patient'
}

function joined<Row>(rows: readonly Row[], earlier: readonly Row[], idOf: (row: Row) => string): Row[] {
  const known = new Set(rows.map(idOf))
  return [...rows, ...earlier.filter(row => !known.has(idOf(row)))]
}
