import { describe, expect, it } from 'vitest'
import { judgePassword } from '#shared/domain/access/password'

const owner = { name: 'Leila Farouk', email: 'leila.farouk@northshore.example', department: 'Northshore Imaging' }
const judge = (password: string) => judgePassword(password, owner)

describe('a new password', () => {
  it('is accepted when it is a few words of one\'s own', () => {
    expect(judge('harbor lantern quiet meadow')).toBeNull()
    expect(judge('three old bicycles in the attic')).toBeNull()
  })

  it('may hold any character, whatever the alphabet', () => {
    expect(judge('зелёный чайник на окне')).toBeNull()
    expect(judge('Zx9!kQ#2mW@7pL$4v')).toBeNull()
    expect(judge('83920174659183025')).toBeNull()
  })

  it('needs 15 characters, each code point counting as one', () => {
    expect(judge('short one')).toMatch(/15 characters/)
    expect(judge('👍🏖🎈🚲🌵🍋🎻')).toMatch(/15 characters/)
  })

  it('counts letters as they are stored, so that a composed accent is one', () => {
    const fourteen = 'caféxyzlmnopqr'
    expect([...fourteen]).toHaveLength(14)
    expect(judge(fourteen.normalize('NFD'))).toMatch(/15 characters/)
  })

  it.each(['leila likes long walks', 'my farouk family home', 'northshore by the lake', 'an imaging department word', 'wherefore art thou romeo'])('is refused with names everybody knows: %s', (password) => {
    expect(judge(password)).toMatch(/name/)
  })

  it.each(['aaaaaaaaaaaaaaaa', 'abcabcabcabcabcabc', 'passwordpassword', 'zebra7zebra7zebra7'])('is refused where it repeats itself: %s', (password) => {
    expect(judge(password)).toMatch(/repeats/)
  })

  it.each(['Password123456789', 'P@ssw0rd!P4ssw0rd?', 'qwertyuiopasdfgh', 'letmein-welcome-2026', 'correcthorsebatterystaple', 'iloveyou monkey dragon', 'qazwsxedcrfvtgby', 'Summer2026!Winter2026!'])('is refused where guessers have it on their lists: %s', (password) => {
    expect(judge(password)).toMatch(/guesser's list/)
  })

  it('never repeats what was typed', () => {
    for (const password of ['leila likes long walks', 'passwordpassword', 'qwertyuiopasdfgh']) expect(judge(password)).not.toContain(password)
  })
})
