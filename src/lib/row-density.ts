import { localSetting } from './local-setting.ts'

export type RowDensity = 'dense' | 'comfortable'

/** The row height of tables, one choice for all of them. */
export const rowDensitySetting = localSetting<RowDensity>('row-height', ['dense', 'comfortable'])

export const ROW_HEIGHT_PX: Record<RowDensity, number> = { dense: 32, comfortable: 40 }
