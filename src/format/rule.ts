/** Which items a rule means, in words: "agm, from 3 years on, 40 m and 20 m". Empty: all of the category. */
export function appliesText(applies: Readonly<Record<string, unknown>>): string {
  const { chemistry, minAgeYears, bands } = applies as {
    chemistry?: string
    minAgeYears?: number
    bands?: string[]
  }
  const age = minAgeYears === undefined ? [] : [`from ${minAgeYears} years on`]
  return [...(chemistry ? [chemistry] : []), ...age, ...(bands ? [bands.join(', ')] : [])].join('; ')
}
