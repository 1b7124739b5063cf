/** One letter, ready to be queued. */
export type Letter = { to: string; subject: string; text: string; html: string }

type Draft = {
  to: string
  subject: string
  greeting: string
  /** Paragraphs above the link. */
  lines: string[]
  link: { words: string; url: string }
  /** Paragraphs below it. */
  after: string[]
}

/** What a person writes for an invitation: who invites whom to what, and one link. */
export function invitationLetter(about: {
  to: string
  name: string
  inviter: string
  title: string
  role: string
  kind: 'shoot' | 'studio'
  url: string
  days: number
}): Letter {
  const to = about.kind === 'shoot' ? `the shoot “${about.title}”` : `the studio “${about.title}”`
  const part =
    about.kind === 'shoot'
      ? ROLE_WORDS[about.role]
      : about.role === 'owner'
        ? 'You will be one of its owners.'
        : 'You can use its kit and start shoots there.'
  return compose({
    to: about.to,
    subject: `${about.inviter} invites you to ${about.title}`,
    greeting: greeting(about.name),
    lines: [
      `${about.inviter} would like you to join ${to} in Sconce, where it is planned together.`,
      ...(part ? [part] : []),
    ],
    link: { words: about.kind === 'shoot' ? 'Open the shoot' : 'Join the studio', url: about.url },
    after: [
      `You need no password. The link is for you alone and works for ${about.days} days.`,
      `If you were not expecting this, leave it be: nothing happens until you open it and say yes.`,
    ],
  })
}

const ROLE_WORDS: Readonly<Record<string, string>> = {
  photographer: 'You will lead the shoot together: light, order, people and the day itself.',
  stylist: 'You will look after wardrobe, hair and make-up: the board, the looks and their pieces.',
  client: 'You will see the board take shape, and sign off the looks you are happy with.',
  crew: 'You will see the plan, set up the lights, and follow the list on the day.',
}

/** The letter that signs a person in without a password. */
export function signInLetter(about: { to: string; name: string; url: string }): Letter {
  return compose({
    to: about.to,
    subject: 'Your link to sign in to Sconce',
    greeting: greeting(about.name),
    lines: ['Here is the link that signs you in. It works once, within 15 minutes.'],
    link: { words: 'Sign in', url: about.url },
    after: ['If you did not ask for it, you need do nothing: nobody is signed in without this letter.'],
  })
}

/** The letter for a new password. */
export function resetLetter(about: { to: string; name: string; url: string }): Letter {
  return compose({
    to: about.to,
    subject: 'A new password for Sconce',
    greeting: greeting(about.name),
    lines: ['Here is the link to choose a new password. It works once, within an hour.'],
    link: { words: 'Choose a password', url: about.url },
    after: ['If you did not ask for it, you need do nothing: your password stays as it is.'],
  })
}

function greeting(name: string): string {
  return name.trim() === '' ? 'Hello,' : `Hello ${name.trim()},`
}

function compose(draft: Draft): Letter {
  const text = [
    draft.greeting,
    ...draft.lines,
    `${draft.link.words}:\n${draft.link.url}`,
    ...draft.after,
    'Sconce',
  ].join('\n\n')
  const paragraph = (words: string) => `<p style="margin:0 0 16px">${escapeHtml(words)}</p>`
  const html = `<!doctype html>
<html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(oneLine(draft.subject))}</title></head>
<body style="margin:0;padding:32px 16px;background:#f4efe6;color:#2b2620;font:16px/1.5 Georgia,serif">
<div style="max-width:520px;margin:0 auto">
${[draft.greeting, ...draft.lines].map(paragraph).join('\n')}
<p style="margin:0 0 16px"><a href="${escapeHtml(draft.link.url)}" style="color:#2b2620;font-weight:bold">${escapeHtml(draft.link.words)}</a></p>
<p style="margin:0 0 16px;font-size:14px">If that does not open, copy this address:<br><span style="word-break:break-all">${escapeHtml(draft.link.url)}</span></p>
${draft.after.map(paragraph).join('\n')}
<p style="margin:0">Sconce</p>
</div></body></html>
`
  return { to: oneLine(draft.to), subject: oneLine(draft.subject), text, html }
}

/** A header never carries a line break, whatever was typed. */
function oneLine(text: string): string {
  return text
    .replace(/[\p{Cc}\u2028\u2029]+/gu, ' ')
    .trim()
    .slice(0, 200)
}

export function escapeHtml(text: string): string {
  return text
    .replace(/&/g, '&amp;')
    .replace(/</g, '&lt;')
    .replace(/>/g, '&gt;')
    .replace(/"/g, '&quot;')
    .replace(/'/g, '&#39;')
}
