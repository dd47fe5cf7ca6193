import { describe, expect, it } from 'vitest'
import { dropActions, performAction, putActions, registeredActions, subscribeActions, type Action } from '../../src/app/actions/registry.ts'
import { isSingleKey, matchesKeys, parseKeys, showKeys } from '../../src/lib/keyboard.ts'

/** What a browser says of a key press, as far as it is read. */
function press(key: string, held: Partial<Record<'ctrlKey' | 'metaKey' | 'altKey' | 'shiftKey', boolean>> = {}): KeyboardEvent {
  const event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'altKey' | 'shiftKey'> = { key, ctrlKey: false, metaKey: false, altKey: false, shiftKey: false, ...held }
  return event as KeyboardEvent
}

describe('keys', () => {
  it('are read as people write them', () => {
    expect(parseKeys('Mod+K')).toEqual({ key: 'k', mod: true, shift: false, alt: false })
    expect(parseKeys('+')).toEqual({ key: '+', mod: false, shift: false, alt: false })
    expect(showKeys('Mod+k')).toBe('Ctrl K')
    expect(showKeys('ArrowDown')).toBe('↓')
  })

  it('match the press that is meant and no other', () => {
    expect(matchesKeys(press('a'), 'a')).toBe(true)
    expect(matchesKeys(press('a', { ctrlKey: true }), 'a')).toBe(false)
    expect(matchesKeys(press('A', { shiftKey: true }), 'a')).toBe(false)
    expect(matchesKeys(press('?', { shiftKey: true }), '?')).toBe(true)
    expect(matchesKeys(press('k', { ctrlKey: true }), 'Mod+k')).toBe(true)
    expect(matchesKeys(press('k', { ctrlKey: true, altKey: true }), 'Mod+k')).toBe(false)
    expect(matchesKeys(press('Enter', { shiftKey: true }), 'Shift+Enter')).toBe(true)
    expect(matchesKeys(press('Enter'), 'Shift+Enter')).toBe(false)
  })

  it('are single only without Ctrl and Alt', () => {
    expect(['a', '?', 'Mod+k', 'Escape', 'Alt+x'].map(isSingleKey)).toEqual([true, true, false, false, false])
  })
})

describe('the action registry', () => {
  const action = (more: Partial<Action>): Action => ({ name: 'test.one', label: 'One', perform: () => undefined, ...more })

  it('lets the later registration of a name stand in, and the earlier one return', () => {
    const page = Symbol('page')
    const part = Symbol('part')
    const done: string[] = []
    putActions(page, [action({ perform: () => done.push('page') })])
    putActions(part, [action({ perform: () => done.push('part') })])
    expect(performAction('test.one')).toBe(true)
    dropActions(part)
    performAction('test.one')
    dropActions(page)
    expect(performAction('test.one')).toBe(false)
    expect(done).toEqual(['part', 'page'])
  })

  it('does not do what cannot be done now', () => {
    const owner = Symbol('owner')
    let done = 0
    putActions(owner, [action({ when: false, perform: () => (done += 1) })])
    expect(performAction('test.one')).toBe(false)
    putActions(owner, [action({ when: true, perform: () => (done += 1) })])
    expect(performAction('test.one')).toBe(true)
    expect(done).toBe(1)
    dropActions(owner)
  })

  it('tells its listeners only of what can be seen', () => {
    const owner = Symbol('owner')
    let told = 0
    const stop = subscribeActions(() => (told += 1))
    putActions(owner, [action({})])
    putActions(owner, [action({ perform: () => undefined })])
    expect(told).toBe(1)
    putActions(owner, [action({ label: 'Two' })])
    expect(told).toBe(2)
    expect(registeredActions().map((entry) => entry.label)).toContain('Two')
    dropActions(owner)
    expect(told).toBe(3)
    stop()
  })
})
