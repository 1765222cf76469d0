/** Quotes: the customer's page, the printed quote, the mails, and what keeps a draft from being sent. */
export const quotes = {
  'customer.licence': 'licence {licence}',
  'customer.quote-name': 'Quote {number}, revision {revision}',
  'customer.quote-line': 'Quote {number}, revision {revision}, of {issued}, good until {until}',
  'customer.for': 'For',
  'customer.at': 'At',
  'customer.stands': 'Where your job stands',
  'customer.work': 'What we will do',
  'customer.options': 'You may add or leave out',
  'customer.option-in': 'In the total below; you may leave it out.',
  'customer.option-out': 'Not in the total below; you may add it.',
  'customer.price': 'What it costs',
  'customer.not-included': 'Not included',
  'customer.assumed': 'Counts we assumed',
  'customer.assumed-count':
    '{area}: {quantity} × {type} (not counted on site; a different count changes the price)',
  'customer.page-of': 'page {page} of {pages}',
  'customer.total.lines': 'Lines together',
  'customer.total.discount': 'Discount, {pct} %',
  'customer.total.net': 'Before tax',
  'customer.total.tax': '{tax}, {pct} %',
  'customer.total.total': 'Total',
  'customer.total.deposit': 'Deposit on acceptance, {pct} %',
  'customer.caution.licensed':
    'The work is done by licensed persons. Local code, permits and the makers’ instructions apply and come before this quote.',
  'customer.caution.hidden':
    'What can not be seen before ceilings and boxes are open is not in the price. If we find such a thing, we stop, show it to you, and go on when you have agreed in writing.',
  'customer.accept.text': 'I accept quote {number}, revision {revision}, of {shop}, for a total of {total}.',
  'customer.accept.additions': 'With these additions: {list}.',
  'customer.accept.no-additions': 'Without the additions that were offered.',
  'customer.accept.deposit': 'A deposit of {deposit} is due now.',
  'customer.accept.read': 'I have read what is included, what is not, and what was assumed.',
  'customer.accept.by-office': 'Recorded by {recorder} for {name} ({reference}): {text}',
  'customer.accepted-already':
    '{name} has accepted revision {revision} already. Nothing more needs to be signed.',
  'customer.shown-differs':
    'The figures on your page are not the ones that stand here now. Load the page again and look at the total before you sign.',
  'customer.closed.accepted': 'This quote has been accepted. Nothing more needs to be signed.',
  'customer.closed.superseded':
    'A newer quote has taken the place of this one. Load the page again to see it.',
  'customer.closed.withdrawn': 'The shop has taken this quote back. Ask them for a new one.',
  'customer.closed.expired':
    'The date up to which this quote could be accepted has passed. You can still read it; ask the shop for a new date.',
  'customer.closed.declined':
    'This quote was declined. If you have changed your mind, ask the shop to send it again.',
  'customer.pdf': 'The quote as a PDF',
  'customer.phone': 'Telephone',
  'customer.mail': 'E-mail',
  'customer.ask': 'Ask',
  'customer.ask-subject': 'A question about quote {number}',
  'customer.go-sign': 'Accept and sign',
  'customer.sign-title': 'Accept and sign',
  'customer.sign.agree': 'Yes, I accept this.',
  'customer.sign.agree-missing': 'Tick the box to say that you accept.',
  'customer.sign.name': 'Your name',
  'customer.sign.name-hint': 'Typing your name here counts as your signature.',
  'customer.sign.name-missing': 'Type your name to sign.',
  'customer.sign.look-again': 'Two things are needed to sign: your tick and your name.',
  'customer.sign.button': 'Sign and accept',
  'customer.sign.no-script':
    'Signing on this page needs JavaScript. You can also answer the mail that brought you here.',
  'customer.not-signed': 'Not signed',
  'customer.decline.open': 'I do not want this work done',
  'customer.decline.reason': 'Why not? The shop reads what you write here.',
  'customer.decline.button': 'Decline the quote',
  'customer.decline.not-sent': 'Not sent',
  'customer.state.accepted': 'Accepted',
  'customer.state.accepted-by': '{name} accepted this quote on {when}, for a total of {total}.',
  'customer.state.record': 'A record was mailed to you. Its number is {hash}.',
  'customer.state.expired': 'Past its date',
  'customer.state.withdrawn': 'Taken back',
  'customer.state.declined': 'Declined',
  'customer.state.superseded': 'Replaced',
  'customer.nothing-yet':
    'There is nothing to read here yet. When the shop sends you a quote, it stands here.',
  'customer.link-closed': 'This link no longer opens anything',
  'customer.link-closed.why':
    'It may be incomplete, it may have been replaced by a newer one, or the shop may have closed it.',
  'customer.link-closed.do':
    'Open the newest mail from the shop and use the link in it. If that does not help, answer the mail or call the shop: they can send you a new link.',
  'customer.wait.survey-not-finished': 'the survey is being finished.',
  'customer.wait.stops-to-clear': 'the quote waits for your answer.',
  'customer.wait.quote-not-sent': 'the quote is being written.',
  'customer.wait.quote-waits-for-answer': 'the quote waits for your answer.',
  'customer.wait.deposit-open': 'the deposit is to be paid.',
  'customer.wait.no-visit-yet': 'a date for the work is being found.',
  'customer.wait.sheet-not-released': 'the work is being prepared.',
  'customer.wait.sheet-not-signed-off': 'the work is being done.',
  'customer.wait.final-invoice-not-sent': 'the final papers are being made.',
  'customer.wait.balance-open': 'the final invoice is to be paid.',
  'customer.wait.job-not-closed': 'everything is done and paid.',
  'customer.wait.nothing': 'everything is done and paid.',
  'quote.blocker.no-lines': 'There is nothing on this quote yet: add a line that is not an addition.',
  'quote.blocker.nothing-to-charge': 'The total is zero. Give at least one line a price.',
  'quote.blocker.open-stop':
    '“{line}” has an open stop. Clear it in the survey, or have it overridden by a licensed person, before the quote goes out.',
  'quote.blocker.source-gone':
    '“{line}” is no longer in the survey. Bring the draft up to date, or take the line out.',
  'quote.blocker.out-of-date':
    '“{line}” is out of date: its source or its price has changed. Bring the draft up to date.',
  'quote.blocker.no-price':
    '“{line}” uses {count} {count, plural, one {part} other {parts}} without a price.',
  'quote.blocker.accepted':
    'The customer has accepted revision {revision}. Changes to it need their own agreement; this draft can not replace it.',
  'mail.quote-sent.subject': 'Your quote {number} from {shop}: {title}',
  'mail.quote-sent.greeting': 'Good day {name},',
  'mail.quote-sent.greeting-plain': 'Good day,',
  'mail.quote-sent.body':
    'Here is our quote for “{title}” at {site}. The total is {total}, and the quote is good until {until}.',
  'mail.quote-sent.button': 'Read the quote and answer',
  'mail.quote-sent.how':
    'The page shows everything we would do and what it costs. You can choose additions there, accept with your name, or decline. The quote is attached as a PDF, too.',
  'mail.quote-sent.private':
    'The link is yours alone: whoever has it can read the quote and answer in your name. Do not pass this mail on.',
  'mail.quote-accepted.subject': 'Accepted: quote {number} of {shop}, {title}',
  'mail.quote-accepted.customer':
    'Thank you. You accepted our quote {number}, revision {revision}, on {when}. Please keep this mail: it is your record.',
  'mail.quote-accepted.by-office':
    'Thank you. We have recorded that you accepted our quote {number}, revision {revision}, on {when} ({reference}). Please tell us at once if that is not right.',
  'mail.quote-accepted.shop': '{name} accepted quote {number}, revision {revision}, on {when}.',
  'mail.quote-accepted.words': 'The words that were agreed to',
  'mail.quote-accepted.signed': 'Signed: {name}',
  'mail.quote-accepted.hash': 'Record {hash}',
  'mail.quote-accepted.see': 'See where your job stands',
  'mail.quote-accepted.open-job': 'Open the job',
  'mail.quote-declined.subject': 'Declined: quote {number}, {title}',
  'mail.quote-declined.shop': '{customer} declined quote {number}, revision {revision}. They wrote:',
} as const;
