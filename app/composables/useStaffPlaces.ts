import { placesOf } from '~/utils/staff-places'

/** The staff places of whoever is signed in. These only steer; the server decides. */
export function useStaffPlaces() {
  const { data } = useAuth()
  return { places: computed(() => placesOf(data.value?.roles ?? [])) }
}
