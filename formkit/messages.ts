import { createI18nPlugin, changeLocale, type FormKitLocale } from '@formkit/i18n'

export { changeLocale, createI18nPlugin }

const lower = (name: unknown) => String(name ?? 'this').replace(/^[A-Z](?=[a-z])/, first => first.toLowerCase())

/** What a field or form says of itself, in the words of the house. */
export const en: FormKitLocale = {
  ui: {
    add: 'Add', remove: 'Take out', removeAll: 'Take all out', incomplete: 'Some fields are not filled in as they should be.', submit: 'Send', noFiles: 'No file chosen',
    moveUp: 'Move up', moveDown: 'Move down', isLoading: 'Loading', loadMore: 'More', next: 'Next', prev: 'Back', addAllValues: 'Add all', addSelected: 'Add chosen', removeAllValues: 'Take all out',
    removeSelected: 'Take chosen out', chooseDate: 'Choose a date', changeDate: 'Change the date', invalidDate: 'There is no such date.', summaryHeader: 'Please look at these again', close: 'Close',
  },
  validation: {
    required: ({ name }) => `Give ${lower(name)}.`,
    number: ({ name }) => `Give ${lower(name)} as a number.`,
    email: 'Give one e-mail address, such as name@firm.example.',
    min: ({ name, args: [least] }) => `${name}: at least ${least}.`,
    max: ({ name, args: [most] }) => `${name}: at most ${most}.`,
    length: ({ name, args: [from, to] }) => to === undefined ? `${name}: at least ${from} characters.` : `${name}: from ${from} to ${to} characters.`,
    invalid: ({ name }) => `Look at ${lower(name)} again.`,
  },
}
