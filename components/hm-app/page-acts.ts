import type { PageAct } from '../shared/events.ts';
import { fetchStarters, starterCards } from './choices.ts';
import type { Page } from './page.ts';
import type { ProjectWishes } from './project-wishes.ts';

/** Carries out one of the page's own acts, from a button, a menu or a key. What fails is said. */
export function actOnPage(page: Page, wishes: ProjectWishes, act: PageAct): void {
  const { session, solver, judging, keeper } = page;
  switch (act) {
    case 'undo':
    case 'redo': {
      const label = session[act]();
      return page.say(label === null ? `Nothing to ${act}.` : `${act === 'undo' ? 'Taken back' : 'Done again'}: ${label}.`);
    }
    case 'projects':
      wishes.remark = '';
      void page.desk.look().then(() => page.requestUpdate(), () => page.say('The list of projects cannot be read.', true));
      return page.element('hm-projects').show();
    case 'starters':
      fetchStarters().then(
        (starters) => (page.element('hm-starters').starters = starterCards(starters)),
        () => page.say('The worked designs could not be fetched.', true),
      );
      return page.element('hm-starters').show();
    case 'leave':
      return page.element('hm-leave').show();
    case 'about':
      return page.element('hm-about').show();
    case 'sheet':
      // The dialogs are modal: the one that it was asked from makes room.
      page.element('hm-leave').close();
      return void import('../hm-sheet/hm-sheet.ts').then(() => page.element('hm-sheet').show(), () => page.say('The review sheet could not be fetched.', true));
    case 'open-file':
      return void page.incoming.pick();
    case 'cancel':
      return solver.cancel();
    case 'again':
      return session.askAgain();
    case 'judge-stop':
      return judging.stop();
    case 'judge-again':
      return void judging.judge(session.design);
    case 'keep-mine':
      return void keeper.keepMineAsCopy().then(() => page.say(`Kept as ${keeper.project.name}.`), () => page.say('The copy could not be saved: take the design away as a file.', true));
    case 'take-other':
      return void keeper.takeTheOther().then((opened) => page.say(opened.ok ? 'This is what the other tab saved.' : opened.why, !opened.ok));
  }
}
