import { SPRING_KINDS, type SpringKind } from '#shared/spring/codes'
import { readSpringAddress } from '#shared/schemas/spring/sheet'
import { paramsOf } from '#shared/spring/sheet/address-params'
import { sheetOf } from '#shared/spring/sheet'

const LONGEST_VALUE = 100
const QUIET_BEFORE_WRITING_MS = 250
const isKind = (text: unknown): text is SpringKind => SPRING_KINDS.some(kind => kind === text)

/** The spring that the address of this page holds, worked out as it is typed; what is typed goes into the address. */
export function useSpringAddress() {
  const route = useRoute()
  const router = useRouter()

  const fromRoute = (): Record<string, string> => Object.fromEntries(Object.entries(route.query).flatMap(([name, value]) => {
    const first = Array.isArray(value) ? value[0] : value
    return first ? [[name, first.slice(0, LONGEST_VALUE)]] : []
  }))
  const query = shallowRef(fromRoute())
  const kind = computed<SpringKind>(() => (isKind(query.value.kind) ? query.value.kind : 'compression'))
  const read = computed(() => readSpringAddress({ ...query.value, kind: query.value.kind ?? kind.value }))
  const result = computed(() => (read.value.spring ? { spring: read.value.spring, ...sheetOf(read.value.spring) } : null))
  const isEmpty = computed(() => Object.keys(query.value).every(name => name === 'kind'))
  /** Faults of names that no field stands for. */
  const strange = computed(() => {
    const known = new Set(paramsOf(kind.value).map(param => param.name))
    return Object.entries(read.value.faults).filter(([name]) => !known.has(name)).map(([name, message]) => ({ name, message }))
  })

  /** Writes the address in place: each letter typed is no step to go back by. */
  let writeLater: ReturnType<typeof setTimeout> | undefined
  function write(): void {
    clearTimeout(writeLater)
    const { fullPath } = router.resolve({ path: route.path, query: query.value })
    history.replaceState({ ...history.state, current: fullPath }, '', fullPath)
  }
  function set(param: string, text: string): void {
    const { [param]: _before, ...others } = query.value
    query.value = { kind: kind.value, ...others, ...(text === '' ? {} : { [param]: text }) }
    clearTimeout(writeLater)
    writeLater = setTimeout(write, QUIET_BEFORE_WRITING_MS)
  }

  /** Opens another spring as a step that one can go back from. */
  async function open(next: Readonly<Record<string, string>>): Promise<void> {
    write()
    query.value = { ...next }
    // The router does not know what was written in place, so it must not think that it is there already
    await router.push({ query: next, force: true })
  }
  /** Another kind keeps what both kinds know. */
  async function choose(next: SpringKind): Promise<void> {
    const known = new Set(paramsOf(next).filter(param => param.form.is !== 'point' && param.paths[next] === param.paths[kind.value]).map(param => param.name))
    await open({ ...Object.fromEntries(Object.entries(query.value).filter(([name]) => known.has(name))), kind: next })
  }

  watch(() => route.query, () => { query.value = fromRoute() })
  onBeforeRouteLeave(() => { if (writeLater) write() })
  onBeforeUnmount(() => clearTimeout(writeLater))

  return { query, kind, read, result, isEmpty, strange, set, open, choose, write }
}
