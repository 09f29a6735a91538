-- Keep one station; changes nothing when its key is taken.
INSERT INTO stations (
    vintage, line, station_id, name, service, in_service, year_retired,
    latitude, longitude, site_elevation, installation, source_kind,
    source_pressure_low, source_pressure_normal,
    source_pressure_elevation, cut_out_level, record_low_level,
    normal_level, water_temp_summer, water_temp_normal, barometer_low,
    discharge_low, discharge_normal, discharge_loss_flow,
    discharge_loss_head, discharge_length, discharge_bore,
    discharge_material, discharge_year, discharge_minor_k,
    pumps_running_max, pumps_running_firm, people_served, flow_served,
    outage_cost_per_day, days_to_restore, note
) VALUES (
    :vintage, :line, :station_id, :name, :service, :in_service,
    :year_retired, :latitude, :longitude, :site_elevation, :installation,
    :source_kind, :source_pressure_low, :source_pressure_normal,
    :source_pressure_elevation, :cut_out_level, :record_low_level,
    :normal_level, :water_temp_summer, :water_temp_normal, :barometer_low,
    :discharge_low, :discharge_normal, :discharge_loss_flow,
    :discharge_loss_head, :discharge_length, :discharge_bore,
    :discharge_material, :discharge_year, :discharge_minor_k,
    :pumps_running_max, :pumps_running_firm, :people_served, :flow_served,
    :outage_cost_per_day, :days_to_restore, :note
)
ON CONFLICT (vintage, station_id) DO NOTHING;
