/** What each section is for, on the page that lists them all; apart, because the first screen does without. */
export const ABOUT: Readonly<Record<string, string>> = {
  board: 'Which kits can go, and until when',
  kits: 'Every packed station and what belongs in it',
  items: 'Every tagged thing and where it is',
  find: 'A thing by its tag',
  forecast: 'What lapses in the coming year, and when',
  advice: 'Most readiness for an hour of work',
  tests: 'What was measured, and what is due',
  consumables: 'Fuses, tape, dry cells: counted, not tagged',
  places: 'Where kits and items live, and who has the key',
  'kit-kinds': 'What each kind of kit promises and must carry',
  'build-sheets': 'How transformers and antennas were made',
  tags: 'Printed tags with their codes',
  policy: 'Which tests are due when, and their limits',
  people: 'Members, roles and invitations',
}
