import { z } from 'zod'

/** The units that a member reads and types; everything is stored in °C and m. */
export const temperatureUnit = z.enum(['C', 'F'])
export const lengthUnit = z.enum(['m', 'ft'])
