/** `query`: imaging asks. `question`: ordering asks. `answer`: whoever owed one. `note`: said without asking anything. */
export const messageKinds = ['query', 'question', 'answer', 'note'] as const
export type MessageKind = (typeof messageKinds)[number]
