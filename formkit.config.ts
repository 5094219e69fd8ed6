import type { FormKitTypeDefinition } from '@formkit/core'
import { defineFormKitConfig } from '@formkit/vue'
import { markRaw, type Component } from 'vue'
import Choices from './app/components/ui/field/Choices.vue'
import Line from './app/components/ui/field/Line.vue'
import Lines from './app/components/ui/field/Lines.vue'
import Select from './app/components/ui/field/Select.vue'
import Tick from './app/components/ui/field/Tick.vue'

/** Our own controls in place of FormKit's: its compiled schemas cost the server 10 ms an input, a component costs almost nothing. */
function control(component: Component, props: string[] = []): FormKitTypeDefinition {
  return { type: 'input', component: markRaw(component), props }
}

const line = control(Line, ['unit', 'reading', 'disabled'])
const choice = ['options', 'placeholder', 'disabled']

export default defineFormKitConfig({
  inputs: {
    'text': line, 'email': line, 'password': line, 'number': line, 'date': line, 'time': line, 'datetime-local': line, 'search': line, 'tel': line,
    'quantity': line,
    'textarea': control(Lines, ['disabled']),
    'select': control(Select, choice),
    'radio': control(Choices, choice),
    'checkbox': control(Tick, ['disabled']),
  },
})
