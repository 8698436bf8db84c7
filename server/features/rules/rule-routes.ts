import type { Mount } from '#server/http/mount.ts';
import { ruleEndpoints } from '#shared/contract/http/rules.ts';
import { listRules, readRules } from './read-rules.ts';
import { setRules } from './set-rules.ts';

/** Rules over HTTP. */
export function mountRuleRoutes(mount: Mount): void {
  mount.person(ruleEndpoints.list, (context) => listRules(context));
  mount.person(ruleEndpoints.readCompany, (context) => readRules(context, { kind: 'company' }));
  mount.person(ruleEndpoints.readModel, (context, { params }) => readRules(context, { kind: 'model', ...params }));
  mount.person(ruleEndpoints.readPump, (context, { params }) => readRules(context, { kind: 'pump', ...params }));
  mount.person(ruleEndpoints.setCompany, (context, { body, ifMatch }) =>
    setRules(context, { scope: { kind: 'company' }, rules: body.rules, ifMatch }),
  );
  mount.person(ruleEndpoints.setModel, (context, { params, body, ifMatch }) =>
    setRules(context, { scope: { kind: 'model', ...params }, rules: body.rules, ifMatch }),
  );
  mount.person(ruleEndpoints.setPump, (context, { params, body, ifMatch }) =>
    setRules(context, { scope: { kind: 'pump', ...params }, rules: body.rules, ifMatch }),
  );
}
