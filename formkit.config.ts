import { defineFormKitConfig } from '@formkit/vue'

export default defineFormKitConfig({
  config: {
    rootClasses(sectionKey: string) {
      const named: Record<string, string> = { outer: 'field', inner: 'box', help: 'hint', legend: 'lab', suffix: 'unit', options: 'choices', messages: 'whys', message: 'why' }
      const name = named[sectionKey]
      return name ? { [name]: true } : {}
    },
  },
})
