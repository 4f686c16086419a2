import type { Action } from '../domain/access/permissions'
import type { AuditAction } from '../domain/access/audit'
import type { Actor, Role } from '../domain/access/roles'
import type { NeedKind, NeedState, Need } from '../domain/assessment/needs'
import type { Assessment } from '../domain/assessment/types'
import type { ContrastOutcome, DecidableOutcome } from '../domain/contrast/outcome'
import type { AgentId } from '../domain/contrast/types'
import type { Guidance } from '../domain/guidance/types'
import type { Letter } from '../domain/letter/types'
import type { LetterKind, LetterState } from '../domain/letter/kinds'
import type { Policy } from '../domain/policy/types'
import type { RecordReading, PatientSearch, ConnectionReport } from '../domain/record/types'
import type { DiffersCause } from '../domain/request/differs'
import type { RequestForm } from '../domain/request/form'
import type { MessageKind } from '../domain/request/messages'
import type { RequestState, Side } from '../domain/request/lifecycle'
import type { Priority } from '../domain/request/priority'
import type { GadoliniumExposure } from '../domain/safety/types'

/** What the server answers, as JSON: instants are ISO strings in UTC. */

export interface MeView {
  actor: Actor
  practices: { id: string, name: string }[]
  shortcuts: boolean
  /** The department's name and IANA zone, for every time on a screen. */
  department: { name: string, timeZone: string, phone: string }
  /** Open work for the badge beside each entry of the navigation. */
  counts: { requests: number, review: number, preparation: number }
  /** Idle minutes after which the session ends. */
  idleMinutes: number
}

export interface Page<Row> { rows: Row[], next: string | null }

export interface PatientView {
  id: string
  displayName: string
  birthDate: string
  /** In words, for instance "61 years" or "7 months". */
  ageWords: string
  sex: string
  recordNumber: string
  phone: string | null
  email: string | null
  detailsByEmail: boolean | null
  consentAskedBy: string | null
  consentAskedAt: string | null
}

/** A line of any worklist. */
export interface RequestRow {
  id: string
  reference: string | null
  state: RequestState
  version: number
  priority: Priority
  sentence: string | null
  outcome: ContrastOutcome | null
  /** After a decision: what was signed. */
  decided: DecidableOutcome | null
  examName: string | null
  region: string | null
  patient: { displayName: string, ageWords: string, sex: string, recordNumber: string }
  practice: string
  /** "eGFR 69", "creatinine 94 days old", "no lab needed", "hemodialysis": what a reader scans for. */
  kidneyLine: string | null
  awaiting: Side | null
  replyWaiting: boolean
  /** The next step and who owes it, in words. */
  nextStep: string
  preparedBy: string
  signedBy: string | null
  sentAt: string | null
  dueAt: string | null
  slot: SlotView | null
  updatedAt: string
}

export interface SlotView { scannerId: string, scanner: string, place: string, startsAt: string, endsAt: string }

export interface MessageView {
  id: string
  kind: MessageKind
  side: Side
  author: string
  mine: boolean
  internal: boolean
  body: string
  createdAt: string
}

export interface DecisionView {
  id: string
  kind: 'approved' | 'declined'
  contrast: DecidableOutcome | null
  agent: AgentId | null
  agentName: string | null
  doseMmolPerKg: number | null
  weightKg: number | null
  amountMmol: number | null
  volumeMl: number | null
  note: string
  differsReason: string | null
  declineReason: string | null
  helpInstead: string | null
  signedBy: string
  signedById: string
  signedAt: string
  /** Until when the signer may take it back; null once past. */
  undoUntil: string | null
}

/** A derived need with what people did about it. */
export interface NeedView extends Need {
  state: NeedState
  note: string
  by: string | null
  at: string | null
  /** A lab need past its due time, or not arranged close to the slot. */
  overdue: boolean
}

export interface AdministrationView {
  id: string
  given: boolean
  contrast: DecidableOutcome
  agent: AgentId | null
  agentName: string | null
  volumeMl: number | null
  amountMmol: number | null
  lot: string
  givenAt: string
  differsCause: DiffersCause | null
  differsReason: string
  reaction: 'none' | 'mild' | 'moderate' | 'severe'
  reactionDetail: string
  extravasation: boolean
  recordedBy: string
  recordedAt: string
}

export interface LetterView {
  id: string
  kind: LetterKind
  state: LetterState
  detailed: boolean
  toAddress: string | null
  attempts: number
  lastError: string | null
  queuedAt: string
  deliveredAt: string | null
  openedAt: string | null
}

export interface TimelineEntry { at: string, who: string, action: AuditAction, sentence: string }

/** Everything one person may see of one request. */
export interface RequestView {
  id: string
  reference: string | null
  state: RequestState
  version: number
  patient: PatientView
  practice: { id: string, name: string, phone: string }
  preparedBy: string
  signedBy: string | null
  sentAt: string | null
  dueAt: string | null
  priority: Priority
  /** Null for a scheduler until opened in full, which the trail notes. */
  form: RequestForm
  record: RecordReading | null
  recordReadAt: string | null
  assessment: Assessment | null
  /** Doses given here before, for the same patient. */
  ledger: GadoliniumExposure[]
  /** What changed since the assessment the radiologist last saw, in words. */
  changes: string[]
  decision: DecisionView | null
  needs: NeedView[]
  messages: MessageView[]
  awaiting: Side | null
  replyWaiting: boolean
  slot: SlotView | null
  administration: AdministrationView | null
  letters: LetterView[]
  timeline: TimelineEntry[]
  copiedFrom: string | null
  /** Actions this person may take now, from the permission table and the state. */
  may: Action[]
}

/** What a write answers: enough to go on; the rest is read again. */
export interface WriteResult { id: string, reference: string | null, state: RequestState, version: number }

export interface AssessmentView {
  assessment: Assessment
  record: RecordReading | null
  recordReadAt: string | null
  /** Doses given here before, for the same patient. */
  ledger: GadoliniumExposure[]
  version: number
}

/** A patient search; `known-here` when the record could not be reached and only people already known to Wherefore were searched. */
export interface PatientSearchView extends PatientSearch { source: 'record' | 'known-here' }

export interface PreparationRow extends RequestRow { needs: NeedView[], phone: string | null, minutes: number, hasLetter: boolean }

export const preparationTabs = ['not-booked', 'needs-something', 'lab-work', 'iv-start', 'held', 'ready', 'done'] as const
export type PreparationTab = (typeof preparationTabs)[number]
export interface PreparationView { rows: PreparationRow[], counts: Record<PreparationTab, number>, next: string | null }

export interface ReviewView extends Page<RequestRow> { total: number }

export interface ScannerView { id: string, name: string, place: string, fieldStrengthTesla: string, ivHours: string }

export interface GuidanceView { guidance: Guidance, version: string, signedBy: string, effectiveFrom: string }
export interface PolicyView { policy: Policy, signedBy: string, effectiveFrom: string }

export interface UserView {
  id: string
  name: string
  email: string
  role: Role
  maySign: boolean
  guidanceLead: boolean
  practices: { id: string, name: string }[]
  state: 'active' | 'invited' | 'disabled'
  lastSeenAt: string | null
  version: number
}
export interface PracticeView { id: string, name: string, phone: string, users: number, disabled: boolean, version: number }

/** Whose invitation a link is; `again`: the account had a password and gets a new one. */
export interface InvitationView { name: string, email: string, department: string, again: boolean }

export interface ConnectionsView {
  checkedAt: string
  ehr: ConnectionReport & { address: string }
  mail: { state: 'ok' | 'unreachable', address: string, message: string }
  queue: { waiting: number, failing: number, dead: number, oldest: string | null }
  database: { state: 'ok' | 'unreachable', migrations: number }
}

export interface FailedLetterView extends LetterView { requestReference: string, requestId: string, patient: string | null }

export interface AuditView {
  id: number
  at: string
  who: string
  role: string | null
  action: AuditAction
  sentence: string
  reference: string | null
  objectType: string
  objectId: string | null
  detail: Record<string, unknown>
  outcome: 'ok' | 'refused'
}

/** Whom to call, beside every answer of the patient's page, also a refused one (`department` in its problem details). */
export interface ExplanationContact { name: string, phone: string, callHours: string }

/** What the patient's page shows once the date of birth was right. */
export interface ExplanationView { letter: Letter, department: { name: string, phone: string, callHours: string, timeZone: string } }

export interface LetterPreview { letter: Letter, detailed: boolean, toAddress: string | null, kind: LetterKind }

export type { Actor, Assessment, NeedKind, PatientSearch, RecordReading }
