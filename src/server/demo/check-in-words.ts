/**
 * What members write in a week, by how the week went. The model draws without repeating itself within one member.
 * `{n}` stands for sessions done, `{where}` for the place that hurt.
 */
export const WEEK_WORDS = {
  good: [
    'All three, and the third one before breakfast. The second set felt like the first for once.',
    'Stairs went easier. I noticed I was talking on the last flight, to nobody.',
    'Did them Monday, Wednesday and Saturday. Hips stayed where they should until the last four.',
    'Quiet week, so everything fitted. The slow way down on the squats is what I feel the day after.',
    'Three sessions. The plank shook from second twenty-five on, then stopped shaking, which I did not expect.',
    'I counted out loud and the neighbour knocked. Carried on in a whisper. All done.',
    'First week that I wanted to do the third session instead of having to.',
    'Good. I slept, I ate before eight, and the numbers came by themselves.',
    'Moved the mat to the landing where there is light. Better. Three of three.',
    'Push-ups felt steady. I stop when the hips dip now and not when the number says so.',
    'The stairs at the end of the session used to be the part I bargained with. Not this week.',
    'Everything as asked. I think the second variant is nearly too kind by now.',
    'Did the long one on Sunday with the radio on. Lost count once and went back two to be honest.',
    'Three sessions in a row of days because of the weekend shift. Legs told me about it. Fine now.',
  ],
  middling: [
    '{n} of three. The missing one went to a birthday.',
    'Two were proper, one was the short version in socks at ten at night.',
    'Work ran long. I did what I could between the door and the bath.',
    '{n} sessions. Sit-ups stayed where they were, and I did not push it.',
    'Some of it was good. The pulling part I did half, the bar slipped and I lost patience.',
    'A so-so week. Nothing hurts, nothing shines.',
    'Started late on two of them and skipped the last set both times. That should be in the log as fewer.',
    'The holiday flat had no stairs. I used a kerb. Does a kerb count?',
    '{n} done. I am the same as two weeks ago, I think. Is that allowed?',
    'Rain all week, so I was home more and still did less. Strange.',
    'The mat is under a drying rack until Friday. I did the wall variant instead.',
    'I was sharper in the morning sessions than in the evening ones by a lot.',
  ],
  bad: [
    'One, and not all of it. The week won.',
    'None, to be plain. Two nights of coughing in the house and then I had it.',
    'It got away from me. I would rather say so than make something up.',
    'Started one on Thursday and stopped after the first round. Nothing hurt, I was simply empty.',
    'Away for work from Monday to Friday, and the hotel stairs are an alarm zone.',
    'Nothing done. The boiler, the inspection, my sister. Next week is clear.',
    'I looked at the mat. It looked back. That is all I have.',
    'Bad sleep, so I walked instead. I know it is not the same.',
  ],
  pain: [
    'The {where} spoke up on the second round and I stopped. Gone the day after, but I would like to know what you think.',
    'Did two, then the {where} was sore getting out of bed. Left the third.',
    'My {where} again. Not sharp, more a rope pulled short. Only on the way down.',
    'The {where} is fine in the session and complains in the evening. I wrote the times down: Tuesday nine, Friday eight.',
  ],
  back: [
    'First week back. I did half of everything and it felt like a lot and like very little.',
    'Back on the mat. Slower, and with the smaller variant, as you said. The {where} stayed quiet.',
    'Two short ones. I had forgotten how friendly the floor is.',
    'The {where} let me do all of it, at the lower stair. I will not be brave yet.',
  ],
  test: [
    'Test day went in before the shift, so legs were fresh and head was not.',
    'Tested on Saturday at the same hour as last time. Push-ups first, five minutes, then the rest.',
    'Test day done. I began the sit-ups far too fast and paid for it at forty seconds.',
    'The stairs test is honest, isn’t it. My daughter counted and was stricter than you.',
  ],
  first: [
    'First week. I read the first lesson twice and measured the stairs three times. They agree now.',
    'It is a start. I had not been on the floor on purpose for years.',
    'Did the first ones. Less than I thought I could, but I know now where I stand.',
  ],
} as const;

/** Answers, by the same kinds of week. `{name}` is the member's first name. */
export const ANSWER_WORDS = {
  good: [
    'That is the shape of a good week, {name}. Keep the stop where you put it; the number follows.',
    'I see three whole posts. Next week asks for one more rep in each set, no more.',
    'Steady is what I was hoping for. The smear on your jamb is wider than this step, so we wait for the test day before we call it.',
    'Good. Leave the variant as it is one week longer, then we go a stair lower together.',
    'Thank you for the honest count. Going back two is exactly right.',
  ],
  middling: [
    'Two of three in a week like that is fine, {name}. The targets stay where they are.',
    'A kerb counts if you write down its height. Next time measure it with your hand: mine is eighteen centimetres.',
    'The same as two weeks ago is allowed, and it is also within the test’s error. I would change nothing yet.',
    'Half with good form is better than all with a slipping bar. A towel in the door frame, on the hinge side, stops it.',
    'Mornings, then. Put two of the three there and let the third be whatever it is.',
  ],
  bad: [
    'Then that was the week. Nothing is owed; start with the first session and the smaller amounts it now asks.',
    'Cough first, stairs later. When you have been well for two days, begin at half and tell me how the breath was.',
    'Thank you for saying so. I have taken next week down by a fifth, and the plan shows it in red.',
    'Walking is not nothing. Come back when the nights do.',
  ],
  pain: [
    'You stopped, and that was right. The {where} gets a week of the easier variant. If it comes at rest or at night, or does not go within two weeks, a doctor looks before I do.',
    'I have swapped that movement for one that leaves the {where} alone. Tell me on Wednesday how it is, in one line.',
    'That pattern sounds like load and not like harm, but I am not a doctor. Half the amount, no bouncing, and if it is worse on Friday you see yours.',
  ],
  back: [
    'Half is the right amount for a first week back. We add a tenth at a time and let the {where} decide.',
    'Good to read you, {name}. The plan starts lower than where you left, on purpose.',
  ],
  test: [
    'Both numbers are on the jamb now, with the error beside them. One has really moved, the other may be the day.',
    'You began at a pace that nobody keeps. Start slower next time and the same legs will give you more.',
    'A stricter counter is a gift. We keep her standard from now on.',
  ],
  first: [
    'Welcome, {name}. Less than you thought is where most people begin. It is only a starting mark.',
    'Measured three times is how I like it. Your step height now sets every stairs target.',
  ],
} as const;

export type WeekKind = keyof typeof WEEK_WORDS;

/** Lines between check-ins, from member and coach. */
export const LINES = {
  member: [
    'Quick one: may I swap Wednesday for Friday?',
    'The lesson says elbows at half a right angle. Both, or only at the bottom?',
    'I found the rail loose on the third step. Mended before the session.',
    'Is it normal that the second day is worse than the first?',
  ],
  coach: [
    'Any day you like, as long as one lies between.',
    'On the way down and at the bottom. On the way up they find their own place.',
    'Good catch. The house card is there for that.',
    'Yes. Soreness likes the second day. If it is a joint and not the muscle, tell me.',
  ],
} as const;

/** Places that hurt, told as people tell them. */
export const PLACES: Record<string, string> = {
  'Petra Lund': 'left shoulder',
  'Henk Albers': 'right knee',
  'Rosalind Ede': 'hip',
  'Silas Orme': 'lower back',
  'Edda Rooke': 'right wrist',
  'Osric Vane': 'back',
};
