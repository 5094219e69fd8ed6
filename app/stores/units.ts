import { defineStore } from 'pinia'
import type { UnitSystem } from '#shared/units/convert'

const YEAR_S = 365 * 86_400

/**
 * The units a person reads and types, kept in a cookie so that a page rendered for one visitor has them at once. The pages
 * rendered once for everybody see no cookie: they start in mm and N, and the browser recalls the choice when it has the page.
 */
export const useUnitsStore = defineStore('units', () => {
  const cookie = useCookie<UnitSystem | null>('units', { sameSite: 'lax', maxAge: YEAR_S, default: () => null })
  const system = ref<UnitSystem>(import.meta.server && cookie.value === 'inch' ? 'inch' : 'metric')

  function choose(chosen: UnitSystem): void {
    system.value = chosen
    cookie.value = chosen
  }
  function recall(): void {
    if (cookie.value === 'inch' || cookie.value === 'metric') system.value = cookie.value
  }
  return { system, choose, recall }
})
