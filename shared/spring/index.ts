export * from './codes'
export * from './materials'
export * from './mechanics'
export * from './sizing'
