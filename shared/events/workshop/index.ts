/** The acts that set up a workshop, all recorded by the same route as the events that move metal. */
export { changeCustodian, closeAccount, openOperation, openPlace, renameAccount } from './places.ts';
export { setParty } from './parties.ts';
export { openJob, setAllowance, setAlloy, setPrice } from './register.ts';
export { setSetting } from './settings.ts';
export { closePeriod, reopenPeriod } from './periods.ts';
export { explainLoss } from './losses.ts';
