export { joinInstallation } from './join.service';
export { peopleLive } from './people.live';
export { peopleRoutes } from './people.routes';
export {
  addFirstOrganiser,
  addMember,
  changeDuty,
  confirmPerson,
  leaveSite,
  removePerson,
} from './people.service';
