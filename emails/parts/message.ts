import type { Component } from 'vue'
import type { z } from 'zod'

/** What a mail is given only when it is sent: the link that was made for it, and the shop's zone. */
export type SendTime = { linkUrl: string, timeZone: string }

/** A kind of e-mail: the one source of its subject, its HTML and its plain text. */
export type MailMessage<Payload> = {
  template: Component
  subject: (payload: Payload) => string
  /** Ready text for the template, which only lays out. */
  props: (payload: Payload, sendTime: SendTime) => Record<string, unknown>
  /** What the preview in Works and the tests show. */
  preview: Payload
  /** Made when the mail is sent; its address comes as `linkUrl`. */
  link?: 'sign-in' | 'confirm-address'
}

type PropsOf<C> = C extends abstract new (...args: never[]) => { $props: infer P } ? Omit<P, keyof import('vue').VNodeProps | keyof import('vue').AllowedComponentProps | keyof import('vue').ComponentCustomProps> : never

/** Ties a template to its payload, so that the type checker sees a word that the template lacks or does not know. */
export function defineMessage<S extends z.ZodType, C extends Component>(
  _payloadSchema: S,
  message: { template: C, subject: (payload: z.output<S>) => string, props: (payload: z.output<S>, sendTime: SendTime) => PropsOf<C> & Record<string, unknown>, preview: z.output<S>, link?: 'sign-in' | 'confirm-address' },
): MailMessage<z.output<S>> {
  return message
}
