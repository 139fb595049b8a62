-- A member belongs to one shop. Told so, the planner expects a technician's visits in their true number, not
-- one in as many as there are shops, and walks a list in its order instead of sorting all of them.
CREATE STATISTICS visit_technician_of_shop (dependencies) ON shop_id, member_id FROM visit_technician;--> statement-breakpoint
ANALYZE visit_technician;
