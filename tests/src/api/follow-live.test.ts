// @vitest-environment jsdom
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { followLive } from '@/api/follow-live.ts'

class FakeSource extends EventTarget {
  static readonly CLOSED = 2
  static all: FakeSource[] = []
  readyState = 0
  constructor(readonly url: string) {
    super()
    FakeSource.all.push(this)
  }
  close(): void {
    this.readyState = FakeSource.CLOSED
  }
}

const follower = () => ({ changed: vi.fn(), connected: vi.fn(), disconnected: vi.fn() })
const last = () => FakeSource.all[FakeSource.all.length - 1] as FakeSource

beforeEach(() => {
  FakeSource.all = []
  vi.stubGlobal('EventSource', FakeSource)
  vi.useFakeTimers()
  vi.spyOn(Math, 'random').mockReturnValue(0.5)
})
afterEach(() => {
  vi.unstubAllGlobals()
  vi.useRealTimers()
  vi.restoreAllMocks()
})

describe('following the group', () => {
  it('hands on what changed and ignores what it cannot read', () => {
    const heard = follower()
    followLive(heard)
    last().dispatchEvent(new MessageEvent('board', { data: '{"revision":8,"kitIds":["k"]}' }))
    last().dispatchEvent(new MessageEvent('board', { data: '{"revision":"x"}' }))
    expect(heard.changed.mock.calls).toEqual([[{ revision: 8, kitIds: ['k'] }]])
  })

  it('opens a closed source again, later each time, and says so', () => {
    const heard = follower()
    followLive(heard)
    last().dispatchEvent(new Event('open'))
    expect(heard.connected).toHaveBeenLastCalledWith(false)
    for (const waitMs of [1_000, 2_000, 4_000]) {
      last().readyState = FakeSource.CLOSED
      last().dispatchEvent(new Event('error'))
      const count = FakeSource.all.length
      vi.advanceTimersByTime(waitMs - 1)
      expect(FakeSource.all).toHaveLength(count)
      vi.advanceTimersByTime(1)
      expect(FakeSource.all).toHaveLength(count + 1)
    }
    last().dispatchEvent(new Event('open'))
    expect(heard.connected).toHaveBeenLastCalledWith(true)
    expect(heard.disconnected).toHaveBeenCalledTimes(3)
  })

  it('leaves a source alone that reconnects by itself', () => {
    followLive(follower())
    last().dispatchEvent(new Event('error'))
    vi.advanceTimersByTime(120_000)
    expect(FakeSource.all).toHaveLength(1)
  })

  it('stops when told', () => {
    const stop = followLive(follower())
    last().readyState = FakeSource.CLOSED
    last().dispatchEvent(new Event('error'))
    stop()
    vi.advanceTimersByTime(120_000)
    expect(FakeSource.all).toHaveLength(1)
  })
})
