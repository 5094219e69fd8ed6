import { h, type FunctionalComponent } from 'vue'
import { formulaRuns } from '#shared/spring/sheet'

/** A symbol or formula with its powers raised and its indices lowered. */
const SpringsFormula: FunctionalComponent<{ text: string }> = ({ text }) => h('span', { class: 'formula' },
  formulaRuns(text).map(({ text: letters, style }) => (style ? h(style === 'power' ? 'sup' : 'sub', letters) : letters)))
SpringsFormula.props = ['text']

export default SpringsFormula
