import { applicationQueries } from '../api/application-queries.ts';
import { joinQueries } from './join-queries.ts';
import { askAgain } from './page-age.ts';
import { startDevice } from './start-device.ts';

// Once a page, when the first part of it behind the sign-in is loaded: the sign-in itself goes without all this.
startDevice((url) => askAgain(applicationQueries, [url]));
joinQueries(applicationQueries);
