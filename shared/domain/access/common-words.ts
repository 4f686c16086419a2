/**
 * Words that passwords are commonly built from, longest first, so that no short one cuts a longer one in two. A password that
 * is only such words, with digits and signs around them, is found in every guesser's list.
 */
export const commonWords: readonly string[] = `
password passwort passphrase passwd letmein welcome welkom login signin sign master admin administrator administration root user guest
secret qwerty azerty qwertz abc monkey dragon sunshine princess football baseball basketball hockey soccer iloveyou love lovely shadow
superman batman spiderman trustno michael jennifer jordan thomas daniel andrew charlie jessica ashley matthew robert joshua george
hunter ranger harley mustang ferrari porsche mercedes summer winter spring autumn monday tuesday wednesday thursday friday saturday
sunday january february march april may june july august september october november december hospital clinic clinical doctor doctors
nurse patient patients radiology radiologist imaging medical medicine health healthcare scanner magnet resonance gadolinium contrast
creatinine kidney changeme change please default temp temporary test testing tester demo example sample computer internet access
account system server database network office work company business money bitcoin starwars pokemon matrix freedom whatever nothing
computer correct horse battery staple hello world mother father family baby angel flower cookie chocolate coffee pepper ginger tiger
lion eagle falcon wolf buddy maggie bailey buster killer thunder phoenix diamond golden silver purple orange yellow green black white
blue red apple banana cherry lemon google facebook twitter amazon microsoft windows samsung iphone android america canada england
london paris berlin chicago boston dallas texas florida california newyork forever friends friend jesus christ heaven blessed faith
nicole amanda andrea joseph william anthony christopher elizabeth victoria samantha patricia maria anna david james john peter paul
mary sarah laura lisa emma alice bob jack sam max the and for you your my is in of to it a new old one two three four five six seven
eight nine zero first last best good great super mega ultra pass word key code open sesame enter start stop go come here there now
`.trim().split(/\s+/).filter((word, at, all) => word.length >= 3 && all.indexOf(word) === at).sort((a, b) => b.length - a.length)
