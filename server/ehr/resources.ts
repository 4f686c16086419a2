import { z } from 'zod'
import { observationStatuses } from '#shared/domain/kidney/types'

/**
 * What the reading takes from FHIR R4 resources. A field in the wrong form is as good as absent, so that one odd note
 * never costs a result; fields that decide whether a result counts are checked where they are used.
 */
const optional = <T extends z.ZodType>(schema: T) => schema.optional().catch(undefined)
const text = optional(z.string())
/** Keeps the readable members of a list and drops the rest. */
const list = <T extends z.ZodType>(schema: T) => z.array(z.unknown()).catch([]).default([])
  .transform(items => items.flatMap((item) => {
    const parsed = schema.safeParse(item)
    return parsed.success ? [parsed.data] : []
  }))

export const fhirJson = z.looseObject({ resourceType: z.string() })
export type FhirJson = z.output<typeof fhirJson>

const coding = z.looseObject({ system: text, code: text, display: text })
export const concept = z.looseObject({ coding: list(coding), text })
export type Coding = z.output<typeof coding>
export type Concept = z.output<typeof concept>

const reference = z.looseObject({ reference: text, display: text })
export type Reference = z.output<typeof reference>
const period = z.looseObject({ start: text, end: text })
export const quantity = z.looseObject({ value: z.unknown().optional(), comparator: z.unknown().optional(), unit: text, system: text, code: text })
export type Quantity = z.output<typeof quantity>
const meta = optional(z.looseObject({ versionId: text, lastUpdated: text }))
const contained = list(fhirJson)
const extensions = list(z.looseObject({ url: text, valueBoolean: optional(z.boolean()) }))

export const bundle = z.looseObject({
  resourceType: z.literal('Bundle'),
  link: list(z.looseObject({ relation: z.string(), url: z.string() })),
  entry: z.array(z.looseObject({
    resource: optional(fhirJson),
    search: optional(z.looseObject({ mode: text })),
  }).catch({ resource: undefined, search: undefined })).optional(),
})
export type Bundle = z.output<typeof bundle>

export const operationOutcome = z.looseObject({
  resourceType: z.literal('OperationOutcome'),
  issue: list(z.looseObject({ severity: text, code: text })),
})

export const capabilityStatement = z.looseObject({
  resourceType: z.literal('CapabilityStatement'),
  fhirVersion: text,
  software: optional(z.looseObject({ name: text, version: text })),
  rest: list(z.looseObject({
    mode: text,
    resource: list(z.looseObject({
      type: z.string(),
      searchParam: list(z.looseObject({ name: z.string() })),
      searchInclude: list(z.string()),
    })),
  })),
})

const telecom = z.looseObject({ system: text, value: text, use: text, rank: optional(z.number()), period: optional(period) })
const humanName = z.looseObject({ use: text, text, family: text, given: list(z.string()), period: optional(period) })

export const patientResource = z.looseObject({
  resourceType: z.literal('Patient'),
  id: z.string().min(1),
  identifier: list(z.looseObject({ use: text, system: text, value: text })),
  active: optional(z.boolean()),
  name: list(humanName),
  telecom: list(telecom),
  gender: text,
  birthDate: text,
  deceasedBoolean: optional(z.boolean()),
  deceasedDateTime: text,
  communication: list(z.looseObject({ language: concept, preferred: optional(z.boolean()) })),
  link: list(z.looseObject({ other: reference, type: text })),
  extension: extensions,
})
export type PatientResource = z.output<typeof patientResource>

const component = z.looseObject({
  code: concept,
  valueQuantity: optional(quantity),
  valueString: text,
  valueCodeableConcept: optional(concept),
  dataAbsentReason: optional(concept),
})

export const observationResource = z.looseObject({
  resourceType: z.literal('Observation'),
  id: z.string().min(1),
  meta,
  identifier: list(z.looseObject({ system: text, value: text })),
  status: z.enum(observationStatuses).catch('unknown'),
  code: concept.catch({ coding: [], text: undefined }),
  subject: optional(reference),
  effectiveDateTime: text,
  effectivePeriod: optional(period),
  effectiveInstant: text,
  effectiveTiming: optional(z.looseObject({ event: list(z.string()) })),
  issued: text,
  performer: list(reference),
  valueQuantity: optional(quantity),
  valueString: text,
  valueBoolean: optional(z.boolean()),
  valueCodeableConcept: optional(concept),
  valueInteger: optional(z.number()),
  dataAbsentReason: optional(concept),
  interpretation: list(concept),
  specimen: optional(reference),
  component: list(component),
  hasMember: list(reference),
  contained,
  modifierExtension: optional(z.array(z.unknown())),
})
export type ObservationResource = z.output<typeof observationResource>
export type ObservationComponent = z.output<typeof component>

export const specimenResource = z.looseObject({
  resourceType: z.literal('Specimen'),
  id: text,
  type: optional(concept),
  collection: optional(z.looseObject({ collectedDateTime: text, collectedPeriod: optional(period) })),
})
export type SpecimenResource = z.output<typeof specimenResource>

export const conditionResource = z.looseObject({
  resourceType: z.literal('Condition'),
  id: text,
  clinicalStatus: optional(concept),
  verificationStatus: optional(concept),
  code: optional(concept),
  subject: optional(reference),
  onsetDateTime: text,
  onsetPeriod: optional(period),
  abatementDateTime: text,
  abatementPeriod: optional(period),
  abatementBoolean: optional(z.boolean()),
  recordedDate: text,
})
export type ConditionResource = z.output<typeof conditionResource>

export const allergyResource = z.looseObject({
  resourceType: z.literal('AllergyIntolerance'),
  id: text,
  clinicalStatus: optional(concept),
  verificationStatus: optional(concept),
  criticality: text,
  code: optional(concept),
  patient: optional(reference),
  onsetDateTime: text,
  recordedDate: text,
  lastOccurrence: text,
  contained,
  reaction: list(z.looseObject({
    substance: optional(concept),
    manifestation: list(concept),
    severity: text,
    onset: text,
    description: text,
  })),
})
export type AllergyResource = z.output<typeof allergyResource>

export const administrationResource = z.looseObject({
  resourceType: z.literal('MedicationAdministration'),
  id: z.string().min(1),
  status: text,
  medicationCodeableConcept: optional(concept),
  medicationReference: optional(reference),
  subject: optional(reference),
  effectiveDateTime: text,
  effectivePeriod: optional(period),
  dosage: optional(z.looseObject({ dose: optional(quantity) })),
  contained,
})
export type AdministrationResource = z.output<typeof administrationResource>

export const procedureResource = z.looseObject({
  resourceType: z.literal('Procedure'),
  id: z.string().min(1),
  status: text,
  code: optional(concept),
  usedCode: list(concept),
  subject: optional(reference),
  performedDateTime: text,
  performedPeriod: optional(period),
})
export type ProcedureResource = z.output<typeof procedureResource>

export const medicationResource = z.looseObject({
  resourceType: z.literal('Medication'),
  id: text,
  code: optional(concept),
  ingredient: list(z.looseObject({ itemCodeableConcept: optional(concept) })),
})
export type MedicationResource = z.output<typeof medicationResource>
