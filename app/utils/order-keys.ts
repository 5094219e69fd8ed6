import type { InjectionKey, Ref } from 'vue'
import type { ReadDraft } from './order-draft'

/** The order form as read, for the fields that say how a value was understood. */
export const ORDER_READ_KEY: InjectionKey<Readonly<Ref<ReadDraft>>> = Symbol('order-read')
