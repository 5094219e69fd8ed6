export * from './spring/common'
export * from './spring/evaluate'
export * from './spring/size'
export * from './spring/materials'
