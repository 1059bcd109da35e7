import type { ConditionNode, RuleBody } from './rule';

/**
 * A rule's body with every point it names put through `rename`, which is told where in the body the name stands.
 * Facts of the clock (`time.hour` …) are no points and stay.
 */
export function mapRulePoints(body: RuleBody, rename: (key: string, path: string) => string): RuleBody {
  const { rest, only } = body;
  return {
    ...body,
    point: rename(body.point, 'point'),
    standIns: body.standIns.map((one, at) => ({ ...one, point: rename(one.point, `standIns.${at}.point`) })),
    ...(rest === undefined
      ? {}
      : {
          rest: {
            ...rest,
            ...(rest.until === undefined
              ? {}
              : { until: { ...rest.until, point: rename(rest.until.point, 'rest.until.point') } }),
            ...(rest.leastGain === undefined
              ? {}
              : {
                  leastGain: {
                    ...rest.leastGain,
                    intake: rename(rest.leastGain.intake, 'rest.leastGain.intake'),
                    return: rename(rest.leastGain.return, 'rest.leastGain.return'),
                  },
                }),
          },
        }),
    ...(only === undefined ? {} : { only: mapTree(only, 'only', rename) }),
  };
}

/** Each point that a body names, once, in the order in which a reader meets them. */
export function pointsOfRule(body: RuleBody): string[] {
  const named = new Set<string>();
  mapRulePoints(body, (key) => {
    named.add(key);
    return key;
  });
  return [...named];
}

type Rename = (key: string, path: string) => string;
type Tree = NonNullable<RuleBody['only']>;

function mapTree(tree: Tree, path: string, rename: Rename): Tree {
  if ('all' in tree) return { all: tree.all.map((node, at) => mapNode(node, `${path}.all.${at}`, rename)) };
  if ('any' in tree) return { any: tree.any.map((node, at) => mapNode(node, `${path}.any.${at}`, rename)) };
  return { not: mapNode(tree.not, `${path}.not`, rename) };
}

function mapNode(node: ConditionNode, path: string, rename: Rename): ConditionNode {
  if (!('fact' in node)) return mapTree(node, path, rename);
  return node.fact.startsWith('time.') ? node : { ...node, fact: rename(node.fact, `${path}.fact`) };
}
