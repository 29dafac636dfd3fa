import { affectedSystem } from '@/lib/domain/clocks/library/affected-system'
import { clusterAgreement } from '@/lib/domain/clocks/library/cluster-agreement'
import { clusterFacilities } from '@/lib/domain/clocks/library/cluster-facilities'
import { clusterNotices } from '@/lib/domain/clocks/library/cluster-notices'
import { clusterOperation } from '@/lib/domain/clocks/library/cluster-operation'
import { clusterRules, type ClusterOptions } from '@/lib/domain/clocks/library/cluster-options'
import { clusterDeficiencyLoop, clusterRequest } from '@/lib/domain/clocks/library/cluster-request'
import {
  clusterEngagement,
  clusterStudy,
  restudyLoop,
} from '@/lib/domain/clocks/library/cluster-study'
import type { ProcedureBody } from '@/lib/domain/clocks/procedure'

/**
 * The federal large-generator cluster process after Orders 2023 and 2023-A: LG-01 to LG-39 with
 * three gates and the affected system steps LG-50 to LG-58. Most numbers are from memory, each
 * marked so; the filed tariff comes first.
 */
export function federalCluster(options: ClusterOptions = {}): ProcedureBody {
  const rules = clusterRules(options)
  return {
    key: rules.key,
    title: rules.title,
    stages: [
      'Request',
      'Engagement',
      'Cluster study',
      'Facilities study',
      'Affected system',
      'Agreement',
      'Construction',
      'Operation',
    ],
    filedStep: 'file',
    operationStep: 'operation',
    loops: [clusterDeficiencyLoop, restudyLoop],
    steps: [
      ...clusterRequest(rules),
      ...clusterEngagement(rules),
      ...clusterStudy(rules),
      ...clusterFacilities(rules),
      ...affectedSystem(rules),
      ...clusterAgreement(rules),
      ...clusterOperation(rules),
      ...clusterNotices(rules),
    ],
  }
}
