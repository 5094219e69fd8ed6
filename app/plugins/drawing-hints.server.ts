/**
 * Parts of a page that stay as the server drew them until somebody presses the spring: their code is not to be fetched with
 * the page. (Nuxt takes lazily hydrated components out of the hints itself, but after the hints are made.) None has styles of its own
 * beyond those that a page links itself.
 */
const PARTS = ['components/order/Kinds.vue', 'components/order/View.vue', 'components/ui/Note.vue', 'components/ui/Icon.vue', 'components/order/Ladder.vue', 'components/spring/Press.vue', 'components/spring/LoadTable.vue', 'components/spring/Tiny.vue']

export default defineNuxtPlugin((nuxtApp) => {
  nuxtApp.hook('app:rendered', ({ ssrContext }) => {
    for (const part of PARTS) ssrContext?.modules?.delete(part)
  })
})
