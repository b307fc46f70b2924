import {
  firmAudit,
  getFirm,
  inviteMember,
  removeFirmConductor,
  removeMember,
  removePreset,
  saveFirmConductor,
  saveFirmDefaults,
  saveFirmSettings,
  savePreset,
  setMemberRole,
  withdrawInvitation,
} from '@farlug/contract/routes';
import type { Frame } from '../../http/frame.ts';
import * as firm from './firm-service.ts';
import * as members from './members-service.ts';

export function registerFirm({ deps, mount }: Frame): void {
  mount(getFirm, ({ member }) => firm.getFirm(deps, member));
  mount(saveFirmSettings, ({ member, body }) => firm.saveSettings(deps, member, body));
  mount(saveFirmDefaults, ({ member, body }) => firm.saveDefaults(deps, member, body));
  mount(savePreset, ({ member, params, body }) => firm.savePreset(deps, member, params.preset, body));
  mount(removePreset, ({ member, params }) => firm.removePreset(deps, member, params.preset));
  mount(saveFirmConductor, ({ member, params, body }) =>
    firm.saveConductor(deps, member, { id: params.conductor, ...body }),
  );
  mount(removeFirmConductor, ({ member, params }) => firm.removeConductor(deps, member, params.conductor));
  mount(inviteMember, ({ member, body }) => members.invite(deps, member, body));
  mount(withdrawInvitation, ({ member, params }) => members.withdraw(deps, member, params.invitation));
  mount(setMemberRole, ({ member, params, body }) => members.setRole(deps, member, params.person, body.role));
  mount(removeMember, ({ member, params }) => members.removeMember(deps, member, params.person));
  mount(firmAudit, ({ member, query }) => firm.auditTrail(deps, member, query.before));
}
