import { describe, expect, it } from 'vitest'
import { mayOnRequest, mayOnUser, needsRow, plainPermissions, requestPermissions, roleMay, userPermissions } from '#shared/domain/access/permissions'
import type { Action, RequestAction, RequestScope } from '#shared/domain/access/permissions'
import { roles } from '#shared/domain/access/roles'
import type { Actor, Role } from '#shared/domain/access/roles'
import { requestStates } from '#shared/domain/request/lifecycle'
import { routeActions } from '#shared/domain/access/routes'

const someone = (role: Role, more: Partial<Actor> = {}): Actor => ({ userId: 'u1', name: 'Someone', role, maySign: true, guidanceLead: false, practiceIds: ['p1'], ...more })
const row = (more: Partial<RequestScope> = {}): RequestScope => ({ practiceId: 'p1', state: 'sent', preparedById: 'u8', signedById: 'u9', ...more })
const requestActions = Object.keys(requestPermissions) as RequestAction[]

describe('ordering clinicians', () => {
  it('never reach another practice\'s request, whatever the action and state', () => {
    for (const action of requestActions) {
      for (const state of requestStates) {
        expect(mayOnRequest(someone('orderer'), action, row({ practiceId: 'p2', state })), `${action} ${state}`).toBe(false)
      }
    }
  })

  it('send only with the right to sign', () => {
    expect(mayOnRequest(someone('orderer'), 'request.send', row({ state: 'draft' }))).toBe(true)
    expect(mayOnRequest(someone('orderer', { maySign: false }), 'request.send', row({ state: 'draft' }))).toBe(false)
  })

  it('never approve, decline or query', () => {
    for (const action of ['request.approve', 'request.decline', 'request.query'] as const) {
      expect(mayOnRequest(someone('orderer'), action, row())).toBe(false)
    }
  })
})

describe('radiologists', () => {
  it('never decide a request they signed or prepared themselves', () => {
    expect(mayOnRequest(someone('radiologist'), 'request.approve', row())).toBe(true)
    expect(mayOnRequest(someone('radiologist'), 'request.approve', row({ signedById: 'u1' }))).toBe(false)
    expect(mayOnRequest(someone('radiologist'), 'request.approve', row({ preparedById: 'u1' }))).toBe(false)
  })

  it('do not see drafts', () => {
    expect(mayOnRequest(someone('radiologist'), 'request.read', row({ state: 'draft' }))).toBe(false)
  })
})

describe('administrators', () => {
  it('see no request', () => {
    for (const action of requestActions) expect(roleMay('administrator', action), action).toBe(false)
  })

  it('never change their own account', () => {
    expect(mayOnUser(someone('administrator'), 'user.change', { userId: 'u1' })).toBe(false)
    expect(mayOnUser(someone('administrator'), 'user.change', { userId: 'u2' })).toBe(true)
  })
})

describe('the table', () => {
  it('asks for the row exactly where a role\'s rule looks at one', () => {
    for (const action of requestActions) {
      for (const role of roles) {
        const values = new Set(requestStates.flatMap(state => ['p1', 'p2'].map(practiceId => mayOnRequest(someone(role), action, row({ state, practiceId })))))
        if (values.size > 1) expect(needsRow(role, action), `${action} ${role}`).toBe(true)
        if (!roleMay(role, action)) expect([...values]).toEqual([false])
      }
    }
  })

  it('names an action that exists for every route that is not public', () => {
    const actions = new Set<string>([...requestActions, ...Object.keys(userPermissions), ...Object.keys(plainPermissions)])
    for (const [route, action] of Object.entries(routeActions) as [string, Action | 'public'][]) {
      expect(action === 'public' || actions.has(action), route).toBe(true)
    }
  })
})
