    always_ff @(posedge clk) if (hit) drum <= skin;
