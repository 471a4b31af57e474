export { peopleLive } from './people.live';
export { peopleRoutes } from './people.routes';
export { addFirstOrganiser } from './people.service';
