/**
 * What the commonest long passwords are made of. Published lists of leaked passwords carry licences that are not ours to
 * pass on, and few of their entries have 15 characters; those that do are short common ones put together. So this keeps
 * the parts, and `password-strength.ts` refuses whatever is put together from them: all pairs of fitting length alone
 * are more than 10,000 passwords (a test counts them).
 */
const WORDS = `
password passwort passw0rd pass word admin administrator root user guest login logon welcome letmein access secret
master changeme default test testing temp temporary system server computer internet windows network security secure
hello helloworld world iloveyou ilove love lovely you me my is the this that and for not dont know mine yours
baby angel princess prince queen king dragon monkey tiger lion eagle falcon shark bear wolf panther horse puppy kitty
sunshine moonlight starlight summer winter spring autumn january february march april may june july august september
october november december monday tuesday wednesday thursday friday saturday sunday morning night today tomorrow
football baseball basketball soccer hockey tennis golf swimming fishing hunting racing player winner champion
superstar hero ninja pirate wizard knight warrior hunter ranger killer shadow
freedom liberty peace forever always never nothing everything something whatever whoever nobody somebody
chocolate cookie cheese pepper ginger banana orange apple cherry strawberry coffee butter sugar honey candy
michael jessica jennifer michelle ashley daniel andrew joshua matthew charlie jordan thomas robert william george
samantha nicole amanda hannah maggie buster bailey lucky happy smile flower rainbow butterfly diamond silver golden
purple yellow black white green blue red pink brown mustang
trustno one two three four five six seven eight nine ten zero first second third
radio radioamateur amateur amateurradio ham hamradio antenna repeater callsign emergency station signal frequency
number phone mobile family mother father mummy daddy sister brother friend friends forever together money bank
matrix phoenix thunder lightning storm fire water earth magic music guitar piano dance rock star
jesus christ god bless heaven church blessed faith grace hope
correcthorsebatterystaple correct horse battery staple
`

/** Rows and patterns of the keyboard that fingers run along, and the ones that people call clever. */
const WALKS = `
qwertyuiop asdfghjkl zxcvbnm qwerty asdf zxcv qwertz azerty qazwsxedc qazwsx rfvtgb yhnujm plokij okmijn
1qaz 2wsx 3edc 4rfv 5tgb 6yhn 7ujm 8ik 9ol 0p 1qaz2wsx3edc4rfv q1w2e3r4t5y6u7i8o9p0 1q2w3e4r5t6y7u8i9o0p
zaq1 xsw2 cde3 vfr4 bgt5 nhy6 mju7 1a2b3c4d5e6f a1b2c3d4e5f6 abc123 123abc 123qwe qwe123 asd123 zxc123 qweasdzxc
112233 123123 121212 102030 1029384756 147258369
159753 753951 741852963 789456123 456789 987654 420 666 777 007 1337 911
`

const list = (text: string) => text.trim().split(/\s+/)

/** A finger's way of at least this many keys counts wherever it begins and ends. */
const SHORTEST_WALK = 4

function stretchesOf(walk: string): string[] {
  const starts = Array.from({ length: Math.max(0, walk.length - SHORTEST_WALK) }, (_, start) => start)
  return starts.flatMap((start) =>
    Array.from({ length: walk.length - SHORTEST_WALK - start + 1 }, (_, more) =>
      walk.slice(start, start + SHORTEST_WALK + more),
    ),
  )
}

/** All of them in lower case, none of fewer than two characters. */
export const COMMON_PARTS: readonly string[] = [
  ...new Set([...list(WORDS), ...list(WALKS), ...list(WALKS).flatMap(stretchesOf)]),
]
