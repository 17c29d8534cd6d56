# What a customer reads. Plain words; one thought to a sentence; at most twenty words.
# Units of the trade stand only in the parts list: messages that begin with "kit-".

## Time and counts

hours = { $count ->
    [one] { $count } hour
   *[other] { $count } hours
}
minutes = { $count ->
    [one] { $count } minute
   *[other] { $count } minutes
}
years = { $count ->
    [one] { $count } year
   *[other] { $count } years
}

date = { $day } { $month } { $year }
date-time = { $date }, { $time }
month-1 = January
month-2 = February
month-3 = March
month-4 = April
month-5 = May
month-6 = June
month-7 = July
month-8 = August
month-9 = September
month-10 = October
month-11 = November
month-12 = December

## Head of the sheet

offer-title = Offer from { $firm }
offer-heading = Power when the mains goes off
offer-for = For
offer-sheet = Sheet { $number }, version { $version }
offer-made-on = Made on { $date }
offer-call = Call { $phone }
offer-licence = Licence { $number }
offer-made-up = This is a made-up example. No such firm or customer exists.
offer-preview = This is what your customer sees. The answer form does not work here.

## The promise

promise-about = About { $duration }
promise-told = When the mains goes off, everything on the list below keeps running for about { $duration }.
promise-start = We counted from { $time }, when the most is switched on.
promise-start-asked = We counted from { $time }, as you asked.
promise-worst = This holds on the coldest day, with a battery near the end of its life.
promise-none = No promise of hours
promise-more = A new battery, or fewer things switched on, lasts longer.

## What stays on

on-heading = What stays on
on-count = { $count } ×
on-all-day = all day
on-between = { $from } to { $to }
on-and = { $first } and { $second }
on-share = working about { $percent }{"\u00A0"}% of the time
on-together = up to { $count } at once
medical-heading = No promise for these
medical-told = A life, a treatment or a precious product may hang on these things. We promise no hours for them.
medical-own = This is not a certified medical supply. Keep the reserve that your doctor or supplier advises.

## What does not

off-heading = What is not on it
off-rest = Everything that is not on the list above.
off-heat = Heaters, irons, kettles, cookers and welders, unless they are on the list.

turn-heading = One at a time
turn-told = Run only one of each group at a time:
turn-motors = When the power changes over, start these one after the other:
turn-or = or

## The picture

cut-heading = How a power cut goes
cut-told = The line shows how much a new battery has left, hour by hour.
cut-picture = Charge left in the battery over a power cut of { $duration }. It ends at about { $left }.
cut-table = The same in figures
cut-after = After
cut-drawn = In use
cut-left = Left in the battery
cut-percent = { $percent }{"\u00A0"}%
cut-start = start
cut-hours = { $hours }{"\u00A0"}h
cost-heading = What makes it last longer
cost-without = Without { $name }: about { $duration } longer
what-if-heading = What if you switch something off?
what-if-told = Tick what you would leave off in a long cut. Nothing is kept; the offer stays as it is.
what-if-button = Show the hours
what-if-then = With these off, the battery lasts about { $duration }.
what-if-now = With everything on, it lasts about { $duration }. Both hold on a cold day with an old battery.
what-if-nothing = Leave at least one thing on.
what-if-week = a week or more

## What we fit

fit-heading = What we fit
fit-what = Part
fit-quantity = Quantity
fit-each = Each
fit-sum = Price
fit-labour = Work
fit-subtotal = Before tax
fit-tax = Tax, { $percent }{"\u00A0"}%
fit-total = Total
price-ends = This price holds until { $date }.
price-note = A word from us

## Good to know

good-heading = Good to know
good-refill = After such a cut the battery needs about { $duration } of mains to fill again.
good-years = Here the battery should serve about { $duration }.
good-years-less = Here the battery should serve less than a year. Talk to us about this first.
good-heat = Heat wears a battery out. Keep its place shaded and airy.
good-added = Each thing you add later shortens the time. Ask us before you add one.
good-water = Top the cells up with pure battery water only, after charging, to just above the plates.
good-old = The old battery is hazardous waste. A licensed recycler must take it.

care-heading = Take care
care-power = A battery holds dangerous power even when all is switched off. Keep metal and jewellery away.
care-sources = There are two sources of power. Switching the mains off does not make the wires dead.
care-socket = Never feed power into a wall socket. It can kill people working on the street's wires.
care-acid = The battery holds acid and gives off gas that can explode. Keep flames and sparks away.
care-air = Keep the air openings of the battery's place free. Never close them up.
care-sealed = The battery can give off gas if it is charged wrongly. Keep its air openings free.
care-lithium = Never bypass the battery's own safety unit. Never charge it below freezing.
care-lift = The battery is heavy. Do not move it by yourself.
care-children = Keep children, water and animals away from it.
care-smoke = If you see smoke, leave and call the fire service. Say that there are batteries.
care-licensed = Work on the board is for a licensed person only.
care-code-iec = Cables, fuses and air follow IEC 60364 and IEC 62485. Whoever signs the work confirms them under local rules.
care-code-nec = Cables, fuses and air follow the NEC and IEC 62485. Whoever signs the work confirms them under local rules.

## The answer

answer-heading = Your answer
answer-told = Take your time. Opening this page tells us nothing and binds you to nothing.
answer-choose = Do you want this work done?
answer-yes = Yes, do this work at this price
answer-no = No, not like this
answer-name = Your full name
answer-words = Anything you want to tell us
answer-words-hint = You may leave this empty.
answer-send = Send my answer
answer-record = We keep your answer with this sheet as a record of what was agreed.
answer-given-yes = { $name } said yes to this sheet on { $time }.
answer-given-no = { $name } said no to this sheet on { $time }.
answer-see = See the record
answer-paper = Signed on paper: name, date
answer-print = To print this sheet, use your browser's print command.
answer-address = This sheet on the web:

problem-heading = Something is missing
problem-title = Error: { $title }
problem-choice = Choose yes or no
problem-name = Enter your full name
problem-name-long = Keep your name to { $count } letters
problem-words-long = Keep your message to { $count } letters

## The record

kept-title = Your answer is kept
kept-heading = Your answer is kept
kept-yes = You said yes.
kept-no = You said no.
kept-name = Name
kept-said = Answer
kept-said-yes = Yes
kept-said-no = No
kept-words = Your words
kept-time = Received
kept-time-utc = World time
kept-sheet = Sheet
kept-total = Price agreed on
kept-total-no = Price on the sheet
kept-mark = Check mark of the sheet
kept-next = What happens next
kept-next-yes = { $firm } will call you to settle a day. This price is now fixed.
kept-next-no = { $firm } will not start any work. Call if you want something changed.
kept-back = Look at the sheet again
kept-print = Keep a copy: use your browser's print command.

## The message that carries the link

message-body = Here is the offer of { $firm }: { $address }

## Sheets that are no longer open

gone-ended-title = This sheet has ended
gone-ended = The time for this offer is over. Call us and we make you a new one.
gone-cancelled-title = This sheet was withdrawn
gone-cancelled = We have taken this sheet back. Call us to hear why, or to get a new one.
gone-replaced-title = There is a newer sheet
gone-replaced = This sheet of { $old } was replaced on { $new }. Call us for the link to the new one.
gone-late = Your answer was not kept, because this sheet is no longer open.
missing-title = There is no sheet here
missing = Check that you opened the whole link. Some letters at its end may be missing.
slow-title = Too many tries
slow = Too many wrong links were opened from here. Wait some minutes, then open your link again.

## Parts list, as it is first filled in

kit-inverter = Inverter with charger, { $rating }, { $bus }, { $wave }, charges at { $current }
kit-sine = pure sine
kit-square = square wave
kit-battery = { $kind }, 12{"\u00A0"}V, { $capacity } at the { $rate } rate
kit-flooded-tubular = Tubular lead-acid battery
kit-flooded-flat = Flat-plate lead-acid battery
kit-agm = Sealed lead-acid battery (AGM)
kit-gel = Sealed lead-acid battery (gel)
kit-lfp = Lithium iron phosphate battery
kit-links = Set of battery links and lugs
kit-cable-battery = { $metal } single-core cable { $size }, { $run }, per metre
kit-cable-supply = { $metal } cable, line and neutral { $size }, earth { $earth }, { $run }, per metre
kit-copper = Copper
kit-aluminium = Aluminium
kit-device = { $device }, { $rating }, breaking { $breaks }, { $run }
kit-run-bank-to-inverter = battery to inverter
kit-run-string-lead = battery string leads
kit-run-inverter-to-board = inverter to board
kit-run-mains-to-inverter = mains to inverter
kit-run-charger-to-bank = charger to battery
kit-labels = Set of warning labels for two sources of power
